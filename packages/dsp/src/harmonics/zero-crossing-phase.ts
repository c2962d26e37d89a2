import { wrapDegrees } from '../model/fit-sinusoids.js';

/**
 * Phase of order h in sine form with zero time at the rising zero crossing of the fundamental:
 * ψ_h = φ_h − h φ_1 − (h − 1)·90°, so that ψ_1 = 0 (the convention of power quality instruments).
 *
 * @param phaseDeg φ_h, cosine form, any common zero time
 * @param fundamentalPhaseDeg φ_1 of the reference, cosine form, same zero time
 */
export function zeroCrossingPhase(order: number, phaseDeg: number, fundamentalPhaseDeg: number): number {
  return wrapDegrees(phaseDeg - order * fundamentalPhaseDeg - (order - 1) * 90);
}
