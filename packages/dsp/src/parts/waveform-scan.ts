import type { WaveformFigures } from '../figures/waveform-figures.js';

/** Running figures of a waveform that comes in blocks. */
export interface WaveformScan {
  push(block: Float64Array): void;
  /** Figures of all samples so far. */
  figures(): WaveformFigures;
  /** rms/mean|x| of all samples so far, DC included; null when all are 0. */
  formFactor(): number | null;
}

/**
 * Mean, rms, peak and form factor in one pass over blocks. The squares are taken about the mean of each block and put
 * together by Chan, Golub and LeVeque ("Updating formulae and a pairwise algorithm for computing sample variances",
 * 1979), so a large DC component costs no digits.
 */
export function createWaveformScan(): WaveformScan {
  let count = 0;
  let mean = 0;
  let squares = 0;
  let absolute = 0;
  let lowest = Infinity;
  let highest = -Infinity;

  function push(block: Float64Array): void {
    const length = block.length;
    if (length === 0) return;
    let sum = 0;
    for (let i = 0; i < length; i++) {
      const x = block[i]!;
      sum += x;
      absolute += Math.abs(x);
      if (x < lowest) lowest = x;
      if (x > highest) highest = x;
    }
    const blockMean = sum / length;
    let blockSquares = 0;
    for (let i = 0; i < length; i++) {
      const away = block[i]! - blockMean;
      blockSquares += away * away;
    }
    const total = count + length;
    const apart = blockMean - mean;
    squares += blockSquares + (apart * apart * count * length) / total;
    mean += (apart * length) / total;
    count = total;
  }

  const rms = () => Math.sqrt(squares / count + mean * mean);
  return {
    push,
    figures: () => ({
      mean,
      rms: rms(),
      peak: Math.max(Math.abs(lowest), Math.abs(highest)),
      lowest,
      highest,
    }),
    formFactor: () => (absolute > 0 ? rms() / (absolute / count) : null),
  };
}
