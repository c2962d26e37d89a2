import { harmonicTable, waveformOf, type FourierSeries } from '@overtally/dsp';
import { toCsv } from '../../../lib/delimited.js';

/** One cycle of a rebuilt wave with its scaling for a file. */
export interface Cycle {
  sampleRateHz: number;
  timeS: Float64Array;
  values: Float64Array;
  /** Largest magnitude; a sample of 1 in the file is this much. */
  fullScale: number;
}

/**
 * One cycle at a number of points. The rate of a WAV file is a whole number of Hz: with a fundamental of 49.98 Hz the file
 * plays at the rounded rate, and the exact one is stated beside it.
 *
 * @param orders orders to rebuild from, 0 for DC
 */
export function cycleOf(series: FourierSeries, orders: ReadonlySet<number>, pointsPerCycle: number): Cycle {
  const { timeS, values } = waveformOf(series, { orders, pointsPerCycle, cycles: 1 });
  const fullScale = values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  return { sampleRateHz: pointsPerCycle * series.frequencyHz, timeS, values, fullScale };
}

/** Time and value of each point (RFC 4180), base units. */
export const cycleCsv = ({ timeS, values }: Cycle, unit: string): string =>
  toCsv([
    ['Time (s)', unit ? `Value (${unit})` : 'Value'],
    ...Array.from(timeS, (time, i) => [time, values[i]!]),
  ]);

/** Samples within ±1 for a WAV file. */
export const normalised = ({ values, fullScale }: Cycle): Float64Array =>
  fullScale === 0 ? values : values.map((value) => value / fullScale);

/** Harmonics as arbitrary-waveform sources take them: order, amount, percent of order 1, phases in both forms. */
export function harmonicsCsv(series: FourierSeries, orders: ReadonlySet<number>, unit: string): string {
  const rms = unit ? `rms (${unit})` : 'rms';
  return toCsv([
    ['Order', 'Frequency (Hz)', rms, 'Of order 1 (%)', 'Phase, cosine form (deg)', 'Phase, sine form (deg)'],
    ...harmonicTable(series)
      .filter(({ order }) => orders.has(order))
      .map(({ order, frequencyHz, rms: value, percent, phaseDeg }) => [
        ...[order, frequencyHz, value, percent, phaseDeg],
        phaseDeg === null ? null : phaseDeg > 90 ? phaseDeg - 270 : phaseDeg + 90,
      ]),
  ]);
}
