import { checkTwoLevelWave, type TwoLevelWave } from './two-level-wave.js';

/** Periodic response of a first-order stage to a wave of two levels. */
export interface TwoLevelSteadyState {
  /** Reached at the falling edge for high > low. */
  atFallingEdge: number;
  /** Reached at the rising edge. */
  atRisingEdge: number;
  peak: number;
  minimum: number;
  mean: number;
  rms: number;
  /** One period from the rising edge; point n of N stands at n/N of it. */
  waveform: (pointCount: number) => Float64Array;
}

/**
 * Steady state of a wave of two levels behind 1/(τs + 1) in closed form, as with a square wave behind an RC low-pass. Each
 * level is approached exponentially; after all transients the period ends where it began. With e1 = e^(−DT/τ),
 * e2 = e^(−(1−D)T/τ) the value at the falling edge is (H1 (1 − e1) + H0 (1 − e2) e1)/(1 − e1 e2), that at the rising edge
 * (H0 (1 − e2) + H1 (1 − e1) e2)/(1 − e1 e2); for ±A at D = 1/2 the peak is A tanh(T/(4τ)).
 *
 * @param timeConstantS τ, positive
 * @throws RangeError for a time constant that is not positive or a wave that is none
 */
export function twoLevelSteadyState(wave: TwoLevelWave, timeConstantS: number): TwoLevelSteadyState {
  checkTwoLevelWave(wave);
  if (!(timeConstantS > 0)) {
    throw new RangeError(`The time constant must be positive, got ${timeConstantS}`);
  }
  const { high, low, duty, frequencyHz } = wave;
  const period = 1 / (frequencyHz * timeConstantS);
  const onTime = duty * period;
  const offTime = (1 - duty) * period;
  // 1 − e^(−x) by expm1 keeps its digits where the period is short against τ.
  const rise = -Math.expm1(-onTime);
  const fall = -Math.expm1(-offTime);
  const whole = -Math.expm1(-period);
  const atFallingEdge = (high * rise + low * fall * (1 - rise)) / whole;
  const atRisingEdge = (low * fall + high * rise * (1 - fall)) / whole;
  const meanSquare =
    (arcEnergy(high, atRisingEdge, onTime) + arcEnergy(low, atFallingEdge, offTime)) / period;
  return {
    atFallingEdge,
    atRisingEdge,
    peak: Math.max(atFallingEdge, atRisingEdge),
    minimum: Math.min(atFallingEdge, atRisingEdge),
    mean: low + duty * (high - low),
    rms: Math.sqrt(meanSquare),
    waveform: (pointCount) =>
      Float64Array.from({ length: pointCount }, (_, n) => {
        const share = n / pointCount;
        return share < duty
          ? high + (atRisingEdge - high) * Math.exp(-share * period)
          : low + (atFallingEdge - low) * Math.exp(-(share - duty) * period);
      }),
  };
}

/** ∫ (level + (start − level) e^(−x))² dx from 0 to the duration, both in units of τ. */
function arcEnergy(level: number, start: number, duration: number): number {
  const step = start - level;
  return (
    level * level * duration -
    2 * level * step * Math.expm1(-duration) -
    (step * step * Math.expm1(-2 * duration)) / 2
  );
}
