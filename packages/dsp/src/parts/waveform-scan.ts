import type { WaveformFigures } from '../figures/waveform-figures.js';

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
  let count = 0;
  let mean = 0;
  let squares = 0;
  let absolute = 0;
  let lowest = Infinity;
  let highest = -Infinity;

  function push(block: Float64Array): boolean {
    const length = block.length;
    if (length === 0) return true;
    const sums = sumBlock(block, count === 0 ? meanOf(block) : mean);
    const apart = sums.shift + sums.away / length - mean;
    const about = Math.max(0, sums.squares - (sums.away * sums.away) / length);
    const total = count + length;
    squares += about + (apart * apart * count * length) / total;
    mean += (apart * length) / total;
    absolute += sums.absolute;
    lowest = Math.min(lowest, sums.lowest);
    highest = Math.max(highest, sums.highest);
    count = total;
    return Number.isFinite(sums.absolute);
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

function meanOf(block: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < block.length; i++) sum += block[i]!;
  return sum / block.length;
}

function sumBlock(block: Float64Array, shift: number) {
  let away = 0;
  let squares = 0;
  let absolute = 0;
  let lowest = Infinity;
  let highest = -Infinity;
  for (let i = 0; i < block.length; i++) {
    const x = block[i]!;
    const d = x - shift;
    away += d;
    squares += d * d;
    absolute += Math.abs(x);
    if (x < lowest) lowest = x;
    if (x > highest) highest = x;
  }
  return { shift, away, squares, absolute, lowest, highest };
}
