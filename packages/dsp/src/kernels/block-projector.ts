import { createKernel } from '../wasm/kernel.js';

/**
 * Projections of one block of samples on components, time counted from the centre of the block in samples: per component
 * Σ x cos(θτ), −Σ x sin(θτ) and, where asked for, Στ x cos(θτ), −Στ x sin(θτ).
 *
 * @returns the sums, component by component; they hold until the next call
 */
export type ProjectBlock = (samples: Float64Array, from: number, to: number) => Float64Array;

/** Sums per component, without and with those weighted by time. */
export const PLAIN_SUMS = 2;
export const TIMED_SUMS = 4;

/** Room of the compiled projector. */
const MOST_HALF = 128;
const MOST_COMPONENTS = 256;

/**
 * Projector for blocks of 2·half samples; of a shorter one the missing samples count as 0. As compiled code where the
 * platform has it; there is one compiled projector, which serves the latest call only.
 *
 * @param angles radians per sample
 */
export function createBlockProjector(angles: Float64Array, half: number, timed: boolean): ProjectBlock {
  const fits = half % 2 === 0 && half <= MOST_HALF && angles.length <= MOST_COMPONENTS;
  compiled = compiled === undefined ? compileProjector() : compiled;
  return fits && compiled !== null ? compiled(angles, half, timed) : plainProjector(angles, half, timed);
}

type Prepare = (angles: Float64Array, half: number, timed: boolean) => ProjectBlock;

let compiled: Prepare | null | undefined;

function compileProjector(): Prepare | null {
  const kernel = createKernel();
  if (kernel === null) return null;
  const blockAt = kernel.allocate(2 * MOST_HALF);
  const foldedAt = kernel.allocate(4 * MOST_HALF);
  const tableAt = kernel.allocate(2 * MOST_HALF * MOST_COMPONENTS);
  const outAt = kernel.allocate(TIMED_SUMS * MOST_COMPONENTS);
  const { foldBlock, projectBlock, projectTimedBlock } = kernel.functions;
  return (angles, half, timed) => {
    const project = timed ? projectTimedBlock : projectBlock;
    const count = angles.length;
    kernel.floats(tableAt, 2 * half * count).set(carrierTable(angles, half));
    const block = kernel.floats(blockAt, 2 * half);
    const out = kernel.floats(outAt, (timed ? TIMED_SUMS : PLAIN_SUMS) * count);
    return (samples, from, to) => {
      block.set(samples.subarray(from, to));
      if (to - from < block.length) block.fill(0, to - from);
      foldBlock(blockAt, half, foldedAt);
      project(foldedAt, half, tableAt, count, outAt);
      return out;
    };
  };
}

/** The same in plain TypeScript. */
export function plainProjector(angles: Float64Array, half: number, timed: boolean): ProjectBlock {
  const table = carrierTable(angles, half);
  const even = new Float64Array(half);
  const odd = new Float64Array(half);
  const each = timed ? TIMED_SUMS : PLAIN_SUMS;
  const out = new Float64Array(each * angles.length);
  return (samples, from, to) => {
    foldAbout(samples, from, to, even, odd);
    out.fill(0);
    for (let c = 0; c < angles.length; c++) {
      const cosineAt = 2 * half * c;
      const sineAt = cosineAt + half;
      for (let i = 0; i < half; i++) {
        out[each * c]! += even[i]! * table[cosineAt + i]!;
        out[each * c + 1]! -= odd[i]! * table[sineAt + i]!;
      }
      if (!timed) continue;
      for (let i = 0; i < half; i++) {
        out[each * c + 2]! += (i + 0.5) * odd[i]! * table[cosineAt + i]!;
        out[each * c + 3]! -= (i + 0.5) * even[i]! * table[sineAt + i]!;
      }
    }
    return out;
  };
}

/** Per component the cosines, then the sines, of θ(i + ½), i < half. */
function carrierTable(angles: Float64Array, half: number): Float64Array {
  const table = new Float64Array(2 * half * angles.length);
  for (let c = 0; c < angles.length; c++) {
    for (let i = 0; i < half; i++) {
      table[2 * half * c + i] = Math.cos(angles[c]! * (i + 0.5));
      table[2 * half * c + half + i] = Math.sin(angles[c]! * (i + 0.5));
    }
  }
  return table;
}

function foldAbout(
  samples: Float64Array,
  from: number,
  to: number,
  even: Float64Array,
  odd: Float64Array,
): void {
  const half = even.length;
  for (let i = 0; i < half; i++) {
    const right = from + half + i;
    const left = from + half - 1 - i;
    const after = right < to ? samples[right]! : 0;
    const before = left < to ? samples[left]! : 0;
    even[i] = after + before;
    odd[i] = after - before;
  }
}
