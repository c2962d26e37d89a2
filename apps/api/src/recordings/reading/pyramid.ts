/**
 * Minima and maxima of a channel over ever longer bins, for drawing any span from few values.
 *
 * Layout, one float64 array: level after level, the finest first; each level is a run of pairs minimum, maximum,
 * one pair for each bin of `baseFactor x levelRatio^level` samples, the last bin of a level possibly shorter. The
 * last level is the first with one bin. Missing samples (NaN) count for nothing; a bin of nothing else is NaN, NaN.
 */
export const baseFactor = 64;
export const levelRatio = 8;

export interface PyramidLevel {
  /** Samples in a bin. */
  factor: number;
  bins: number;
  /** Index of the level's first value in the array. */
  offset: number;
}

/** The levels of the pyramid over `sampleCount` samples, the finest first; none over no samples. */
export function pyramidLevels(sampleCount: number): PyramidLevel[] {
  const levels: PyramidLevel[] = [];
  let offset = 0;
  for (let factor = baseFactor; sampleCount > 0; factor *= levelRatio) {
    const bins = Math.ceil(sampleCount / factor);
    levels.push({ factor, bins, offset });
    offset += 2 * bins;
    if (bins === 1) break;
  }
  return levels;
}

/** Builds the pyramid while samples arrive; holds two values for every 64 samples. */
export class PyramidBuilder {
  private base = new Float64Array(2048);
  private filled = 0;
  private inBin = 0;
  private lowest = Infinity;
  private highest = -Infinity;

  add(samples: Float64Array): void {
    for (const sample of samples) {
      if (sample < this.lowest) this.lowest = sample;
      if (sample > this.highest) this.highest = sample;
      this.inBin += 1;
      if (this.inBin === baseFactor) this.closeBin();
    }
  }

  /** All levels in the layout above. */
  finish(): Float64Array {
    if (this.inBin > 0) this.closeBin();
    const levels: Float64Array[] = [this.base.slice(0, this.filled)];
    while (levels.at(-1)!.length > 2) levels.push(coarser(levels.at(-1)!));
    const pyramid = new Float64Array(levels.reduce((length, level) => length + level.length, 0));
    let offset = 0;
    for (const level of levels) {
      pyramid.set(level, offset);
      offset += level.length;
    }
    return pyramid;
  }

  private closeBin(): void {
    if (this.filled === this.base.length) {
      const longer = new Float64Array(this.base.length * 2);
      longer.set(this.base);
      this.base = longer;
    }
    const empty = this.lowest > this.highest;
    this.base[this.filled] = empty ? NaN : this.lowest;
    this.base[this.filled + 1] = empty ? NaN : this.highest;
    this.filled += 2;
    this.inBin = 0;
    this.lowest = Infinity;
    this.highest = -Infinity;
  }
}

/** Joins every `ratio` bins of `pairs` to one, the last possibly of fewer. */
export function coarser(pairs: Float64Array, ratio = levelRatio): Float64Array {
  const bins = Math.ceil(pairs.length / 2 / ratio);
  const joined = new Float64Array(2 * bins);
  for (let bin = 0; bin < bins; bin += 1) {
    let lowest = Infinity;
    let highest = -Infinity;
    const end = Math.min(pairs.length, 2 * ratio * (bin + 1));
    for (let i = 2 * ratio * bin; i < end; i += 2) {
      if (pairs[i]! < lowest) lowest = pairs[i]!;
      if (pairs[i + 1]! > highest) highest = pairs[i + 1]!;
    }
    joined[2 * bin] = lowest > highest ? NaN : lowest;
    joined[2 * bin + 1] = lowest > highest ? NaN : highest;
  }
  return joined;
}
