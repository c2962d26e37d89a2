import { synthesise } from '../harmonics/synthesise.js';
import type { FourierSeries } from './types.js';

export interface WaveformOptions {
  /** Orders to draw, 0 for DC; all if left out. */
  orders?: ReadonlySet<number>;
  /** Points of one cycle, at least 2. */
  pointsPerCycle: number;
  /** Default 1. */
  cycles?: number;
}

export interface Waveform {
  /** From the start of the first cycle. */
  timeS: Float64Array;
  values: Float64Array;
}

/**
 * A periodic signal rebuilt from its orders, or from some of them: the sum itself at equidistant points, not an
 * interpolation. An order whose phase is not known cannot be drawn and is left out; `undrawnOrders` names them.
 *
 * @throws RangeError when the points of a cycle are not an integer of at least 2, or the cycles not one of at least 1
 */
export function waveformOf(
  series: FourierSeries,
  { orders, pointsPerCycle, cycles = 1 }: WaveformOptions,
): Waveform {
  if (!(Number.isInteger(cycles) && cycles >= 1)) {
    throw new RangeError(`A waveform shows at least 1 whole cycle, got ${cycles}`);
  }
  const drawn = series.components.flatMap(({ order, rms, phaseDeg }) =>
    phaseDeg !== null && (orders?.has(order) ?? true) ? [{ order, rms, phaseDeg }] : [],
  );
  const cycle = synthesise(drawn, pointsPerCycle, (orders?.has(0) ?? true) ? series.dc : 0);
  const values = new Float64Array(cycles * pointsPerCycle);
  for (let i = 0; i < cycles; i++) values.set(cycle, i * pointsPerCycle);
  const step = 1 / (series.frequencyHz * pointsPerCycle);
  return { values, timeS: values.map((_, n) => n * step) };
}

/** Orders that hold something but cannot be drawn, since their phase is not known. */
export function undrawnOrders(series: FourierSeries): number[] {
  return series.components
    .filter(({ rms, phaseDeg }) => phaseDeg === null && rms > 0)
    .map(({ order }) => order)
    .sort((a, b) => a - b);
}
