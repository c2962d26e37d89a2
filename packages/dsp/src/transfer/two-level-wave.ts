import type { FourierSeries } from '../fourier/types.js';
import { wrapDegrees } from '../model/fit-sinusoids.js';

/** A wave of two levels: `high` from the rising edge at t = 0 for `duty` of the period, `low` for the rest. */
export interface TwoLevelWave {
  high: number;
  low: number;
  /** Share of the period at the high level, between 0 and 1. */
  duty: number;
  frequencyHz: number;
}

/** @throws RangeError for a duty that is not between 0 and 1 or a frequency that is not positive */
export function checkTwoLevelWave({ duty, frequencyHz }: TwoLevelWave): void {
  if (!(duty > 0 && duty < 1)) throw new RangeError(`The duty must lie between 0 and 1, got ${duty}`);
  if (!(frequencyHz > 0)) throw new RangeError(`The frequency must be positive, got ${frequencyHz}`);
}

/**
 * Fourier series of a wave of two levels in closed form: the phasor of order h is (high − low) 2 sin(πhD)/(πh) e^(−jπhD)
 * as peak value, cosine form, t = 0 at the rising edge.
 *
 * @throws RangeError for a wave that is none, see `checkTwoLevelWave`
 */
export function twoLevelSeries(wave: TwoLevelWave, maxOrder: number): FourierSeries {
  checkTwoLevelWave(wave);
  const { high, low, duty, frequencyHz } = wave;
  const components = Array.from({ length: maxOrder }, (_, i) => {
    const order = i + 1;
    // sin(πhD) with whole half turns taken out first, so that it is exactly zero where it should be.
    const turns = order * duty;
    const halfTurns = Math.round(turns);
    const sine = (halfTurns % 2 === 0 ? 1 : -1) * Math.sin(Math.PI * (turns - halfTurns));
    const amplitude = ((high - low) * 2 * sine) / (Math.PI * order);
    const phase = wrapDegrees(-180 * turns + (amplitude < 0 ? 180 : 0));
    return {
      order,
      rms: Math.abs(amplitude) / Math.SQRT2,
      phaseDeg: amplitude === 0 ? null : phase,
    };
  });
  return { frequencyHz, dc: low + duty * (high - low), components };
}
