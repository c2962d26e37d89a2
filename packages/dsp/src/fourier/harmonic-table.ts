import { zeroCrossingPhase } from '../harmonics/zero-crossing-phase.js';
import type { FourierSeries } from './types.js';

/** One row of a table of harmonics. */
export interface HarmonicRow {
  /** 0 is DC. */
  order: number;
  frequencyHz: number;
  /** rms of the order; of DC its value with the sign. */
  rms: number;
  /** Of the fundamental; null without one. */
  percent: number | null;
  /** Cosine form, zero time = start of the cycle. */
  phaseDeg: number | null;
  /** Sine form, zero time = rising zero crossing of the fundamental. */
  phaseZeroCrossingDeg: number | null;
}

/** DC and the orders of a series, in order, as rows for a table or an export. */
export function harmonicTable(series: FourierSeries): HarmonicRow[] {
  const fundamental = series.components.find(({ order }) => order === 1);
  const reference = fundamental?.phaseDeg ?? null;
  const percent = (value: number) =>
    fundamental && fundamental.rms > 0 ? (100 * value) / fundamental.rms : null;
  const orders = [...series.components].sort((a, b) => a.order - b.order);
  return [
    {
      order: 0,
      frequencyHz: 0,
      rms: series.dc,
      percent: percent(series.dc),
      phaseDeg: null,
      phaseZeroCrossingDeg: null,
    },
    ...orders.map(({ order, rms, phaseDeg }) => ({
      order,
      frequencyHz: order * series.frequencyHz,
      rms,
      percent: percent(rms),
      phaseDeg,
      phaseZeroCrossingDeg:
        phaseDeg === null || reference === null ? null : zeroCrossingPhase(order, phaseDeg, reference),
    })),
  ];
}
