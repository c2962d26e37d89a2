import type { OrderSet } from '../stages/order-set.js';

/**
 * One standard deviation of the fundamental frequency by the Cramér-Rao bound (Kay, "Fundamentals of Statistical Signal
 * Processing", vol. 1, 3.11, extended to Σ h² A_h² for a harmonic series), with the noise that the orders leave over.
 */
export function frequencyDeviationHz(
  { rms, noiseRms }: OrderSet,
  { sampleRateHz, sampleCount }: { sampleRateHz: number; sampleCount: number },
): number {
  const variance = noiseRms * noiseRms * sampleCount;
  const weighted = rms.reduce((sum, x, i) => sum + 2 * ((i + 1) * x) ** 2, 0);
  return (
    (sampleRateHz / (2 * Math.PI)) *
    Math.sqrt((24 * variance) / (weighted * sampleCount * (sampleCount * sampleCount - 1)))
  );
}
