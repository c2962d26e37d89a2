import type { WaveformFigures } from '../figures/waveform-figures.js';
import { createBlockSums } from '../kernels/block-sums.js';

/** Running figures of a waveform that comes in blocks. */
export interface WaveformScan {
  /** Takes the next samples and answers whether all of them are finite numbers. */
  push(block: Float64Array): boolean;
  /** Figures of all samples so far. */
  figures(): WaveformFigures;
  /** rms/mean|x| of all samples so far, DC included; null when all are 0. */
  formFactor(): number | null;
}

/**
 * Mean, rms, peak and form factor in one pass over blocks. The squares of a block are taken about the mean of the blocks
 * before (of the first, about its own), corrected to its own mean and put together by Chan, Golub and LeVeque ("Updating
 * formulae and a pairwise algorithm for computing sample variances", 1979), so a large DC component costs no digits.
 */
export function createWaveformScan(): WaveformScan {
  const sumBlock = createBlockSums();
  let count = 0;
  let mean = 0;
  let squares = 0;
  let absolute = 0;
  let lowest = Infinity;
  let highest = -Infinity;

  function push(block: Float64Array): boolean {
    const length = block.length;
    if (length === 0) return true;
    const shift = count === 0 ? sumBlock(block, 0).away / length : mean;
    const sums = sumBlock(block, shift);
    const apart = shift + sums.away / length - mean;
    const about = Math.max(0, sums.squares - (sums.away * sums.away) / length);
    const total = count + length;
    squares += about + (apart * apart * count * length) / total;
    mean += (apart * length) / total;
    absolute += sums.absolute;
    lowest = Math.min(lowest, sums.lowest);
    highest = Math.max(highest, sums.highest);
    count = total;
    return sums.notFinite === 0;
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
