import { angleDegrees, complexAbs, complexAdd, fromPolar, type Complex } from '../linear/complex.js';
import type { PhasorSet } from './types.js';

/** Orders below this share of the largest one of the channel have no phase worth stating. */
const PHASE_SHARE = 1e-3;
/** Nor have orders within this many standard deviations of noise. */
const PHASE_DEVIATIONS = 10;

/** Phasor of an order (rms, cosine form). */
export function phasorOf(set: PhasorSet, order: number): Complex {
  return fromPolar(set.rms[order - 1]!, set.phaseDeg[order - 1]!);
}

/** rms below which an order of the channel is taken for noise. */
export function noiseFloor(set: PhasorSet): number {
  return Math.max(PHASE_SHARE * Math.max(0, ...Array.from(set.rms)), PHASE_DEVIATIONS * (set.noiseRms ?? 0));
}

/** True where an order stands out of the noise, so that its phase means something. */
export function isAboveNoise(set: PhasorSet, order: number): boolean {
  const rms = set.rms[order - 1]!;
  return rms > 0 && rms >= noiseFloor(set);
}

/** The orders that all sets hold. */
export function commonOrders(...sets: PhasorSet[]): number[] {
  const count = Math.min(...sets.map((set) => set.rms.length));
  return Array.from({ length: count }, (_, i) => i + 1);
}

/**
 * Σ w_k x_k of channels of one record, such as u1 − u2 or i1 + i2 + i3. What the orders leave over in each channel
 * (interharmonics, noise) is taken for independent from channel to channel and adds as powers.
 */
export function combinePhasors(sets: readonly PhasorSet[], weights: readonly number[]): PhasorSet {
  const phasors = commonOrders(...sets).map((order) =>
    sets.reduce<Complex>(
      (sum, set, k) => {
        const { re, im } = phasorOf(set, order);
        return complexAdd(sum, { re: weights[k]! * re, im: weights[k]! * im });
      },
      { re: 0, im: 0 },
    ),
  );
  const rms = phasors.map(complexAbs);
  const dc = sets.reduce((sum, set, k) => sum + weights[k]! * set.dc, 0);
  const rest = sets.reduce((sum, set, k) => sum + weights[k]! ** 2 * leftOver(set), 0);
  const noise = sets.reduce((sum, set, k) => sum + (weights[k]! * (set.noiseRms ?? 0)) ** 2, 0);
  return {
    dc,
    totalRms: Math.sqrt(rms.reduce((sum, x) => sum + x * x, dc * dc + rest)),
    rms,
    phaseDeg: phasors.map(angleDegrees),
    noiseRms: Math.sqrt(noise),
  };
}

/** Mean square beside DC and the orders. */
function leftOver(set: PhasorSet): number {
  const orders = Array.from(set.rms).reduce((sum, x) => sum + x * x, 0);
  const rest = set.totalRms ** 2 - set.dc ** 2 - orders;
  return Math.max(0, rest);
}
