import { Injectable } from '@nestjs/common';
import type { Analysis, ChannelAnalysis, LimitSet, VerdictParameters } from '@overtally/contracts';
import { currentShape, smooth, smoothingAlpha, type CurrentShapeAngles } from '@overtally/dsp';
import {
  measurementOfChannel,
  ordersAbove150,
  resolveLimits,
  type CurrentShape,
  type Measurement,
} from '@overtally/limits';
import { SeriesService } from '../analyses/series/series.service.js';
import { RecordingsService } from '../recordings/recordings.service.js';
import { WaveformService } from '../recordings/waveform.service.js';
import { voltageBeside } from './voltage-beside.js';

/** Cycles that are read at each place, and where in the record these stand. */
const shapeCycles = 4;
const shapePlaces = [0.25, 0.5, 0.75];

/** A channel of an analysis with all that limits may ask of it. */
@Injectable()
export class MeasurementsService {
  constructor(
    private readonly series: SeriesService,
    private readonly recordings: RecordingsService,
    private readonly waveforms: WaveformService,
  ) {}

  /**
   * The measurement that `set` is applied to: figures of the analysis, and where the verdict hangs on them, values over
   * time of single orders and the shape of the current. What was not kept stays unknown.
   */
  async of(
    analysis: Analysis,
    channel: ChannelAnalysis,
    set: LimitSet,
    parameters: VerdictParameters,
  ): Promise<Measurement> {
    const measurement = measurementOfChannel(channel);
    for (const order of ordersAbove150(set, measurement, parameters)) {
      const smoothed = await this.smoothed(analysis.id, channel.index, order);
      const harmonic = measurement.harmonics.find((each) => each.order === order);
      if (harmonic && smoothed) harmonic.smoothed = smoothed;
    }
    const asksForShape = resolveLimits(set, parameters).limits?.some(({ waveform }) => waveform !== null);
    return asksForShape ? { ...measurement, currentShape: await this.shape(analysis, channel) } : measurement;
  }

  /** 1.5 s smoothed groups of an order, as the analysis smooths them (IEC 61000-4-7, 5.5.1). */
  private async smoothed(analysisId: string, index: number, order: number): Promise<Float64Array | null> {
    const groups = await this.series.groups(analysisId, index, order);
    if (groups === null || groups.values.some(Number.isNaN)) return null;
    return smooth(groups.values, smoothingAlpha(groups.intervalS));
  }

  /** The worst of the shapes at three places of the record; null without a voltage, or where one cannot be read. */
  private async shape(analysis: Analysis, channel: ChannelAnalysis): Promise<CurrentShape | null> {
    const voltage = voltageBeside(analysis, channel.index);
    const frequencyHz = voltage?.fundamental?.frequencyHz;
    const { sampleRateHz, sampleCount } = await this.recordings.get(analysis.recordingId);
    if (!voltage || !frequencyHz || !sampleRateHz || !sampleCount) return null;
    const { fromS = 0, toS = Infinity } = analysis.settings.span ?? {};
    const first = Math.ceil(fromS * sampleRateHz);
    const count = Math.min(sampleCount, Math.floor(toS * sampleRateHz)) - first;
    const length = Math.ceil((shapeCycles * sampleRateHz) / frequencyHz);
    const shapes: (CurrentShapeAngles | null)[] = [];
    for (const place of shapePlaces) {
      const from = first + Math.max(0, Math.floor(place * count - length / 2));
      const read = (index: number) =>
        this.waveforms.samples(analysis.recordingId, index, from, Math.min(from + length, first + count));
      const [current, volts] = [await read(channel.index), await read(voltage.index)];
      shapes.push(currentShape({ current, voltage: volts, sampleRateHz, frequencyHz }));
    }
    return worstShape(shapes);
  }
}

/** The latest start and peak and the earliest end. */
function worstShape(shapes: readonly (CurrentShapeAngles | null)[]): CurrentShape | null {
  const known = shapes.filter((shape) => shape !== null);
  if (known.length < shapes.length) return null;
  return {
    startsDeg: Math.max(...known.map(({ startsDeg }) => startsDeg)),
    peakDeg: Math.max(...known.map(({ peakDeg }) => peakDeg)),
    endsDeg: Math.min(...known.map(({ endsDeg }) => endsDeg)),
  };
}
