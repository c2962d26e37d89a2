import type { ResonancePeak } from '../transfer/resonance.js';

export interface ResonanceWarningOptions {
  /** How near an order must be to a peak, in percent of the frequency of the peak. */
  bandPercent: number;
  /** Gain above which a peak counts; 1 is no amplification. */
  leastGain: number;
}

/** An order that lies near a resonance. */
export interface ResonanceWarning {
  order: number;
  frequencyHz: number;
  peak: ResonancePeak;
  /** Distance of the order from the peak in percent of the frequency of the peak; negative below it. */
  distancePercent: number;
}

/** Orders that lie within a band about a peak whose gain exceeds a figure, by order; of several peaks, the nearest. */
export function resonanceWarnings(
  orders: readonly number[],
  fundamentalHz: number,
  peaks: readonly ResonancePeak[],
  { bandPercent, leastGain }: ResonanceWarningOptions,
): ResonanceWarning[] {
  const strong = peaks.filter(({ gain }) => gain > leastGain);
  return [...orders]
    .sort((a, b) => a - b)
    .flatMap((order) => {
      const frequencyHz = order * fundamentalHz;
      const near = strong
        .map((peak) => ({
          ...{ order, frequencyHz, peak },
          distancePercent: 100 * (frequencyHz / peak.frequencyHz - 1),
        }))
        .filter(({ distancePercent }) => Math.abs(distancePercent) <= bandPercent)
        .sort((a, b) => Math.abs(a.distancePercent) - Math.abs(b.distancePercent));
      return near.slice(0, 1);
    });
}
