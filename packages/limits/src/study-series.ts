import type { ChannelAnalysis, Quantity, StudySeries } from '@overtally/contracts';
import type { Measurement } from './measurement.js';

/**
 * The harmonics that a study starts from: of each order the rms of its single line with its phase (not groups, which hold
 * what lies beside the line, and not smoothed values), the mean as DC, and what is left of the rms as the rest. Time counts
 * from the rising zero crossing of the fundamental, where its phase is known.
 *
 * @returns null without a fundamental
 */
export function seriesOfChannel(channel: ChannelAnalysis): StudySeries | null {
  const { fundamental, harmonics, mean, rms } = channel;
  if (fundamental === null || harmonics.length === 0) return null;
  const dc = mean ?? 0;
  const fromCrossing = harmonics.some(({ phaseZeroCrossingDeg }) => phaseZeroCrossingDeg !== null);
  const square = harmonics.reduce((sum, harmonic) => sum + harmonic.rms ** 2, dc ** 2);
  return {
    frequencyHz: fundamental.frequencyHz,
    dc,
    components: harmonics.map(({ order, rms: ofOrder, phaseDeg, phaseZeroCrossingDeg }) => ({
      order,
      rms: ofOrder,
      // Sine form lags the cosine form by 90°.
      phaseDeg: fromCrossing ? cosineForm(phaseZeroCrossingDeg) : phaseDeg,
    })),
    ...(rms !== null && { restRms: Math.sqrt(Math.max(0, rms ** 2 - square)) }),
  };
}

function cosineForm(sineDeg: number | null): number | null {
  if (sineDeg === null) return null;
  const cosine = sineDeg - 90;
  return cosine <= -180 ? cosine + 360 : cosine;
}

/** A periodic signal by its orders. */
interface PeriodicSignal {
  dc: number;
  components: readonly { order: number; rms: number }[];
  restRms?: number | undefined;
}

/**
 * A periodic signal as limits take it. In the steady state every smoothed value of an order is the order itself; its
 * uncertainty is not known.
 */
export function measurementOfSeries(series: PeriodicSignal, quantity: Quantity, unit: string): Measurement {
  const { components, dc, restRms = 0 } = series;
  const square = components.reduce((sum, { rms }) => sum + rms ** 2, dc ** 2 + restRms ** 2);
  return {
    ...{ quantity, unit },
    rms: Math.sqrt(square),
    fundamentalRms: components.find(({ order }) => order === 1)?.rms ?? null,
    harmonics: components.map(({ order, rms }) => ({ order, mean: rms, smoothedMax: rms })),
    highestMeasurableOrder: components.reduce((highest, { order }) => Math.max(highest, order), 0),
  };
}
