import { createBlockProjector, PLAIN_SUMS, plainProjector, TIMED_SUMS } from '../kernels/block-projector.js';

/** Sums over a segment, time counted in samples from its centre c = (N − 1)/2. */
export interface Projections {
  /** Σ x cos(θ(n − c)) and Σ x sin(θ(n − c)) per component. */
  cosine: Float64Array;
  sine: Float64Array;
}

export interface TimedProjections extends Projections {
  /** Σ (n − c) x cos(θ(n − c)) and Σ (n − c) x sin(θ(n − c)) per component. */
  timeCosine: Float64Array;
  timeSine: Float64Array;
}

/**
 * Projections of `length` samples from `start` on components at `angles` (radians per sample; 0 stands for DC).
 *
 * Trigonometric functions are called for the table of one short block only; each block is folded about its centre, so
 * that a component costs one multiplication per sample, and turned to its place in the segment by a recurrence.
 */
export function projections(
  samples: Float64Array,
  start: number,
  length: number,
  angles: Float64Array,
): Projections {
  return accumulate(samples, start, length, angles, false);
}

/** As `projections`, with the time-weighted sums as well. */
export function timedProjections(
  samples: Float64Array,
  start: number,
  length: number,
  angles: Float64Array,
): TimedProjections {
  return accumulate(samples, start, length, angles, true);
}

const HALF_BLOCK = 128;
/** Samples times components below which compiled code would not earn its preparation. */
const LEAST_COMPILED = 2 ** 16;

function accumulate(
  samples: Float64Array,
  start: number,
  length: number,
  angles: Float64Array,
  timed: boolean,
): TimedProjections {
  const half = Math.min(HALF_BLOCK, Math.ceil(length / 2));
  const block = 2 * half;
  const count = angles.length;
  const sums = { cosine: zeros(count), sine: zeros(count), timeCosine: zeros(count), timeSine: zeros(count) };
  const createProjector = length * count < LEAST_COMPILED ? plainProjector : createBlockProjector;
  if (count === 0) return sums;
  const project = createProjector(angles, half, timed);
  const each = timed ? TIMED_SUMS : PLAIN_SUMS;
  const turn = turners(angles, block, (block - length) / 2);
  for (let b = 0; b * block < length; b++) {
    const from = start + b * block;
    const parts = project(samples, from, Math.min(start + length, from + block));
    const offset = b * block + (block - length) / 2;
    for (let c = 0; c < count; c++) {
      const re = parts[each * c]!;
      const im = parts[each * c + 1]!;
      const zRe = turn.re[c]!;
      const zIm = turn.im[c]!;
      sums.cosine[c]! += re * zRe - im * zIm;
      sums.sine[c]! -= re * zIm + im * zRe;
      if (timed) {
        const timeRe = offset * re + parts[each * c + 2]!;
        const timeIm = offset * im + parts[each * c + 3]!;
        sums.timeCosine[c]! += timeRe * zRe - timeIm * zIm;
        sums.timeSine[c]! -= timeRe * zIm + timeIm * zRe;
      }
      turn.re[c] = zRe * turn.stepRe[c]! - zIm * turn.stepIm[c]!;
      turn.im[c] = zRe * turn.stepIm[c]! + zIm * turn.stepRe[c]!;
    }
  }
  return sums;
}

function zeros(length: number): Float64Array {
  return new Float64Array(length);
}

/** e^(−jθ·first centre) and the step e^(−jθ·block) per component. */
function turners(angles: Float64Array, block: number, firstCentre: number) {
  return {
    re: angles.map((angle) => Math.cos(angle * firstCentre)),
    im: angles.map((angle) => -Math.sin(angle * firstCentre)),
    stepRe: angles.map((angle) => Math.cos(angle * block)),
    stepIm: angles.map((angle) => -Math.sin(angle * block)),
  };
}
