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
  const mean = low + duty * (high - low);
  return {
    atFallingEdge,
    atRisingEdge,
    peak: Math.max(atFallingEdge, atRisingEdge),
    minimum: Math.min(atFallingEdge, atRisingEdge),
    mean,
    rms: Math.sqrt(mean ** 2 + (high - low) ** 2 * acShare(onTime / 2, offTime / 2)),
    waveform: (pointCount) =>
      Float64Array.from({ length: pointCount }, (_, n) => {
        const share = n / pointCount;
        return share < duty
          ? high + (atRisingEdge - high) * Math.exp(-share * period)
          : low + (atFallingEdge - low) * Math.exp(-(share - duty) * period);
      }),
  };
}

/**
 * Mean square of the AC part over (high − low)²: D(1 − D) − (τ/T)(1 − e1)(1 − e2)/(1 − e1 e2), from τy' = u − y and the
 * period of y, written with a = DT/(2τ), b = (1 − D)T/(2τ) and the Langevin function so that nothing cancels.
 */
function acShare(a: number, b: number): number {
  const cothSum = 1 / Math.tanh(a) + 1 / Math.tanh(b);
  return (langevin(a) + langevin(b)) / ((a + b) * (1 / a + 1 / b) * cothSum);
}

/** coth x − 1/x, by its power series where the two nearly cancel. */
function langevin(x: number): number {
  if (x > 0.2) return 1 / Math.tanh(x) - 1 / x;
  const square = x * x;
  return x * (1 / 3 - square * (1 / 45 - square * (2 / 945 - square * (1 / 4725 - square * (2 / 93555)))));
}
