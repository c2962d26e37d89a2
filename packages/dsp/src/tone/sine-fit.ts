import { refineFrequency } from '../fundamental/refine-frequency.js';
import { fitSinusoids, toFit, type SinusoidFit } from '../model/fit-sinusoids.js';
import { subtractSinusoid } from './subtract-sinusoid.js';

export interface SineFit {
  frequencyHz: number;
  /** Peak amplitude A of A cos(2πft + φ) + C. */
  amplitude: number;
  /** φ in degrees, t = 0 at the first sample. */
  phaseDeg: number;
  /** C. */
  offset: number;
  /** rms of samples minus fit over all samples. */
  residualRms: number;
}

/** Fewest samples for as many unknowns. */
const FEWEST_SAMPLES = 4;
/** A few samples take many steps, each shrinking the last by some factor only. */
const TOLERANCE_LINES = 1e-10;
const MOST_STEPS = 30;

/**
 * Three-parameter (known frequency) least-squares sine fit of IEEE 1057: amplitude, phase and offset.
 *
 * @throws RangeError for fewer than 4 samples or a frequency that is not between 0 and half the sample rate
 */
export function sineFit3(samples: Float64Array, sampleRateHz: number, frequencyHz: number): SineFit {
  requireFrequency(samples, sampleRateHz, frequencyHz);
  return describeFit(samples, sampleRateHz, fitSinusoids(samples, sampleRateHz, [frequencyHz]));
}

/**
 * Four-parameter least-squares sine fit of IEEE 1057: as `sineFit3` with the frequency among the unknowns,
 * by Gauss-Newton steps on it.
 *
 * @param startHz start value, right to about half a line (sample rate over number of samples)
 * @throws RangeError as `sineFit3`, for the start value
 */
export function sineFit4(samples: Float64Array, sampleRateHz: number, startHz: number): SineFit {
  requireFrequency(samples, sampleRateHz, startHz);
  const whole = { samples, sampleRateHz, start: 0, length: samples.length };
  const { solution, angles } = refineFrequency(whole, startHz, [1], TOLERANCE_LINES, MOST_STEPS);
  return describeFit(samples, sampleRateHz, toFit(solution, angles, samples.length, sampleRateHz));
}

function requireFrequency(samples: Float64Array, sampleRateHz: number, frequencyHz: number): void {
  if (samples.length < FEWEST_SAMPLES) {
    throw new RangeError(`A sine fit needs at least ${FEWEST_SAMPLES} samples, got ${samples.length}`);
  }
  if (!(frequencyHz > 0 && frequencyHz < sampleRateHz / 2)) {
    throw new RangeError(
      `The frequency must lie between 0 and ${sampleRateHz / 2} Hz, got ${frequencyHz} Hz`,
    );
  }
}

function describeFit(samples: Float64Array, sampleRateHz: number, { dc, components }: SinusoidFit): SineFit {
  const [sine] = components;
  if (!sine) throw new RangeError('The frequency is too close to half the sample rate for so few samples');
  const rest = new Float64Array(samples.length);
  const meanSquare = subtractSinusoid(samples, sampleRateHz, sine, dc, rest);
  return {
    frequencyHz: sine.frequencyHz,
    amplitude: Math.SQRT2 * sine.rms,
    phaseDeg: sine.phaseDeg,
    offset: dc,
    residualRms: Math.sqrt(meanSquare),
  };
}
