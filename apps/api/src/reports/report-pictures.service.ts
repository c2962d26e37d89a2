import { HttpException, Injectable } from '@nestjs/common';
import type { ChannelAnalysis, DistortionSeries, Settings, WaveformExcerpt } from '@overtally/contracts';
import { SeriesService } from '../analyses/series/series.service.js';
import { WaveformService } from '../recordings/waveform.service.js';
import { isMissingObject } from '../storage/missing-object.js';

const cycles = 4;
const mostPoints = 800;
/** What is shown where no fundamental tells the length of a cycle. */
const withoutFundamentalS = 0.1;
const mostIntervals = 400;
/** The figures are drawn, not judged: six digits are more than the finest line shows. */
const digits = 6;

interface Judged {
  recordingId: string;
  analysisId: string;
  settings: Settings;
  channel: ChannelAnalysis;
}

/** Excerpts of stored arrays that a report draws, small enough to be kept with it. */
@Injectable()
export class ReportPictures {
  constructor(
    private readonly waveforms: WaveformService,
    private readonly series: SeriesService,
  ) {}

  /** What can be drawn of a judged channel; null where nothing is stored. */
  async of({
    recordingId,
    analysisId,
    settings,
    channel,
  }: Judged): Promise<{ waveform: WaveformExcerpt | null; distortion: DistortionSeries | null }> {
    const [waveform, distortion] = await Promise.all([
      orNull(this.waveform(recordingId, channel, settings.span?.fromS ?? 0)),
      orNull(this.distortion(analysisId, channel.index)),
    ]);
    return { waveform, distortion };
  }

  private async waveform(
    recordingId: string,
    { index, fundamental }: ChannelAnalysis,
    fromS: number,
  ): Promise<WaveformExcerpt> {
    const lengthS = fundamental === null ? withoutFundamentalS : cycles / fundamental.frequencyHz;
    const part = { channel: index, fromS, toS: fromS + lengthS, points: mostPoints };
    const { unit, kind, startS, stepS, ...values } = await this.waveforms.part(recordingId, part);
    return {
      ...{ unit, kind, startS, stepS },
      values: rounded(values.values),
      minimum: rounded(values.minimum),
      maximum: rounded(values.maximum),
    };
  }

  private async distortion(analysisId: string, channel: number): Promise<DistortionSeries> {
    const { unit, intervalS, timeS, value, thinned } = await this.series.figure(analysisId, {
      ...{ channel, figure: 'thds', order: 1 },
      ...{ aggregation: 'window', maxPoints: mostIntervals },
    });
    return { unit, intervalS, thinned, timeS: rounded(timeS) as number[], value: rounded(value) };
  }
}

const rounded = (values: readonly (number | null)[]): (number | null)[] =>
  values.map((value) => (value === null ? null : Number(value.toPrecision(digits))));

/** A report is made of stored figures and stands without its pictures, so what is not there is left out. */
async function orNull<T>(picture: Promise<T>): Promise<T | null> {
  try {
    return await picture;
  } catch (error) {
    const isAbsent = error instanceof HttpException && error.getStatus() < 500;
    if (isAbsent || isMissingObject(error)) return null;
    throw error;
  }
}
