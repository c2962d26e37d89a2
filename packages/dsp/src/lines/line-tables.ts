import { filterResponse } from './decimation-filter.js';
import { GATHERED_LINES, gatheringKernel } from './kaiser-bessel.js';
import type { LineFrame } from './line-frame.js';

/** How lines are gathered from the spectrum of a frame, for assembly/lines.ts. */
export interface LineTables {
  lineCount: number;
  /** Byte offset of the first neighbour of each line. */
  starts: Int32Array;
  /** `GATHERED_LINES` weights for each line. */
  weights: Float64Array;
  /** Complex factor of each line: re, im. */
  factors: Float64Array;
}

/**
 * Tables for the peak amplitudes of lines about the centre (sampleCount − 1)/2 of a window: 2/N Σ x e^(−jθ(n − c)), half of
 * that for frequency 0.
 *
 * @param frequencies cycles per sample, 0 up to the highest of the frame
 */
export function lineTables(frame: LineFrame, sampleCount: number, frequencies: Float64Array): LineTables {
  const { filter } = frame;
  const lineCount = frequencies.length;
  const starts = new Int32Array(lineCount);
  const weights = new Float64Array(lineCount * GATHERED_LINES);
  const factors = new Float64Array(2 * lineCount);
  // The frame counts time from a whole sample.
  const aside = Math.floor(sampleCount / 2) - (sampleCount - 1) / 2;
  frequencies.forEach((frequency, k) => {
    const place = frequency * filter.factor * frame.size;
    const first = Math.ceil(place - GATHERED_LINES / 2);
    starts[k] = 8 * first;
    for (let i = 0; i < GATHERED_LINES; i++) {
      weights[k * GATHERED_LINES + i] = gatheringKernel(place - first - i, frame.oversampling);
    }
    // Of `factor` samples one is kept.
    const response = filterResponse(filter, frequency) / filter.factor;
    const scale = (frequency === 0 ? 1 : 2) / (sampleCount * response);
    factors[2 * k] = scale * Math.cos(2 * Math.PI * frequency * aside);
    factors[2 * k + 1] = -scale * Math.sin(2 * Math.PI * frequency * aside);
  });
  return { lineCount, starts, weights, factors };
}
