import { besselI0 } from '../windows/bessel-i0.js';

/**
 * The Kaiser-Bessel pair for transforms at frequencies between the lines: a line is the sum of the `width` neighbouring
 * lines of an oversampled transform, weighted by `gatheringKernel`, if the samples were weighted by `sampleWeight`
 * before (D. Potts, G. Steidl, M. Tasche, "Fast Fourier transforms for nonequispaced data: a tutorial", 2001).
 */

/** Neighbours that a line is gathered from: the relative error stays near 1e-13 from an oversampling of 1.6 upwards. */
export const GATHERED_LINES = 16;
/** Least ratio of the length of the transform to the number of samples. */
export const LEAST_OVERSAMPLING = 1.6;

/** @param oversampling length of the transform over the number of samples */
function shape(oversampling: number): number {
  return Math.PI * (2 - 1 / oversampling);
}

/** The weight of a neighbour `distance` lines away, at most half of `GATHERED_LINES`. */
export function gatheringKernel(distance: number, oversampling: number): number {
  const root = Math.sqrt(Math.max(0, (GATHERED_LINES / 2) ** 2 - distance * distance));
  const b = shape(oversampling);
  if (root === 0) return b / Math.PI;
  const grown = Math.exp(b * root);
  return (grown - 1 / grown) / (2 * Math.PI * root);
}

/** The weight of a sample `position` samples from the centre. @param size length of the transform */
export function sampleWeight(position: number, size: number, oversampling: number): number {
  const turn = (2 * Math.PI * position) / size;
  const b = shape(oversampling);
  return 1 / besselI0((GATHERED_LINES / 2) * Math.sqrt(Math.max(0, b * b - turn * turn)));
}
