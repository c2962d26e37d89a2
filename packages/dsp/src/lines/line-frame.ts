import { layHalfTurns } from '../fft/kernel-real-fft-plan.js';
import { createKernelTransform } from '../fft/kernel-transform.js';
import { convenientLength } from '../fft/radices.js';
import type { Kernel } from '../wasm/kernel.js';
import { decimationFilter, type DecimationFilter } from './decimation-filter.js';
import { GATHERED_LINES, LEAST_OVERSAMPLING, sampleWeight } from './kaiser-bessel.js';

/** So that the lines mirrored at either end do not overlap. */
const SHORTEST_SIZE = 4 * GATHERED_LINES;

/**
 * A transform in the memory of a kernel whose lines lie so close that the DFT at any frequency up to a highest one can be
 * gathered from them. The samples are low-pass filtered and decimated, weighted and transformed around their centre.
 */
export interface LineFrame {
  readonly filter: DecimationFilter;
  /** Length of the transform; line j of it is the frequency j/(size·factor) in cycles per sample. */
  readonly size: number;
  readonly oversampling: number;
  /** Addresses of line 0 of the spectrum; `GATHERED_LINES` lines on both sides are there as well. */
  readonly re: number;
  readonly im: number;
  /**
   * Transforms `count` samples from `start`, at most the capacity; time is counted from sample floor(count/2).
   *
   * @returns mean of the squares of the samples
   */
  transform(samples: Float64Array, start: number, count: number): number;
}

/**
 * @param capacity most samples
 * @param highest highest frequency wanted, cycles per sample
 */
export function createLineFrame(kernel: Kernel, capacity: number, highest: number): LineFrame {
  const filter = decimationFilter(highest);
  const { factor, reach } = filter;
  const half = Math.ceil((Math.ceil(capacity / 2) + reach) / factor);
  const kept = 2 * half + 1;
  const size = convenientLength(Math.max(SHORTEST_SIZE, LEAST_OVERSAMPLING * kept));
  const oversampling = size / kept;
  const transform = createKernelTransform(kernel, size / 2);
  const turns = layHalfTurns(kernel, size);
  const re = kernel.allocate(size / 2 + 1 + 2 * GATHERED_LINES) + 8 * GATHERED_LINES;
  const im = kernel.allocate(size / 2 + 1 + 2 * GATHERED_LINES) + 8 * GATHERED_LINES;
  const weights = layWeights(kernel, half, size, oversampling);
  const taps = layTaps(kernel, filter);
  /** Where the centre of the samples lies. */
  const centre = factor * half + reach;
  const length = 2 * centre + 2;
  const samplesAt = kernel.allocate(length);
  const { decimate, meanSquare, mirror, unpackEven, weigh } = kernel.functions;

  /** Grid points from `first` (in grid steps from the centre) into the source of the transform at `place`. */
  function fill(first: number, count: number, weightsAt: number, place: number): void {
    const from = samplesAt + 8 * (centre + factor * first - reach);
    const to = transform.source + 8 * place;
    if (factor === 1) weigh(from, weightsAt, count, to);
    else decimate(from, factor, taps, 2 * reach + 2, weightsAt, count, to);
  }

  return {
    ...{ filter, size, oversampling, re, im },
    transform(samples, start, count) {
      const from = centre - Math.floor(count / 2);
      const view = kernel.floats(samplesAt, length);
      view.fill(0, 0, from);
      view.set(samples.subarray(start, start + count), from);
      view.fill(0, from + count);
      fill(0, half + 1, weights, 0);
      fill(-half, half, weights + 8 * (half + 1), size - half);
      unpackEven(transform.run(), size / 2, turns, re, im);
      mirror(re, im, GATHERED_LINES, -8);
      mirror(re + 4 * size, im + 4 * size, GATHERED_LINES, 8);
      return meanSquare(samplesAt + 8 * from, count);
    },
  };
}

/** Weights of the kept samples 0..half, then −half..−1. */
function layWeights(kernel: Kernel, half: number, size: number, oversampling: number): number {
  const address = kernel.allocate(2 * half + 1);
  const table = kernel.floats(address, 2 * half + 1);
  for (let i = 0; i <= half; i++) {
    table[i] = sampleWeight(i, size, oversampling);
    if (i > 0) table[2 * half + 1 - i] = table[i]!;
  }
  return address;
}

/** All taps of the filter and a 0 that makes their number even. */
function layTaps(kernel: Kernel, { reach, taps }: DecimationFilter): number {
  const address = kernel.allocate(2 * reach + 2);
  const table = kernel.floats(address, 2 * reach + 2);
  for (let i = 0; i <= 2 * reach; i++) table[i] = taps[Math.abs(i - reach)]!;
  return address;
}
