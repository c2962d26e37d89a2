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
  const table = blockTable(angles, half);
  const turn = turners(angles, block, (block - length) / 2);
  const even = zeros(half);
  const odd = zeros(half);
  for (let b = 0; b * block < length; b++) {
    foldBlock(samples, start + b * block, start + length, even, odd);
    const offset = b * block + (block - length) / 2;
    for (let c = 0; c < count; c++) {
      const from = c * half;
      let re = 0;
      let im = 0;
      for (let i = 0; i < half; i++) {
        re += even[i]! * table.cosine[from + i]!;
        im -= odd[i]! * table.sine[from + i]!;
      }
      const zRe = turn.re[c]!;
      const zIm = turn.im[c]!;
      sums.cosine[c]! += re * zRe - im * zIm;
      sums.sine[c]! -= re * zIm + im * zRe;
      if (timed) {
        let timeRe = offset * re;
        let timeIm = offset * im;
        for (let i = 0; i < half; i++) {
          const tau = i + 0.5;
          timeRe += tau * odd[i]! * table.cosine[from + i]!;
          timeIm -= tau * even[i]! * table.sine[from + i]!;
        }
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

function blockTable(angles: Float64Array, half: number): { cosine: Float64Array; sine: Float64Array } {
  const cosine = zeros(angles.length * half);
  const sine = zeros(angles.length * half);
  for (let c = 0; c < angles.length; c++) {
    for (let i = 0; i < half; i++) {
      cosine[c * half + i] = Math.cos(angles[c]! * (i + 0.5));
      sine[c * half + i] = Math.sin(angles[c]! * (i + 0.5));
    }
  }
  return { cosine, sine };
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

function foldBlock(
  samples: Float64Array,
  start: number,
  end: number,
  even: Float64Array,
  odd: Float64Array,
): void {
  const half = even.length;
  for (let i = 0; i < half; i++) {
    const right = start + half + i;
    const left = start + half - 1 - i;
    const after = right < end ? samples[right]! : 0;
    const before = left < end ? samples[left]! : 0;
    even[i] = after + before;
    odd[i] = after - before;
  }
}
