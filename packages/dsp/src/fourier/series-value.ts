import type { FourierSeries } from './types.js';

/** Value of a series at one time, in cycles from the start of a cycle; orders of unknown phase count with 0°. */
export function seriesValue({ dc, components }: FourierSeries, cycles: number): number {
  return components.reduce((sum, { order, rms, phaseDeg }) => {
    // Whole turns out first, so that late times keep their digits.
    const turns = order * cycles;
    const angle = 2 * Math.PI * (turns - Math.round(turns)) + ((phaseDeg ?? 0) * Math.PI) / 180;
    return sum + Math.SQRT2 * rms * Math.cos(angle);
  }, dc);
}
