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

/** Bins of one level while samples arrive: the bin that is open, and those closed since they were last taken. */
class OpenLevel {
  private closed = new Float64Array(2048);
  private filled = 0;
  private inBin = 0;
  private lowest = Infinity;
  private highest = -Infinity;

  /** @param width parts that make a bin: samples, or bins of the finer level */
  constructor(private readonly width: number) {}

  /** How many parts are wanting until the open bin is whole. */
  get wanting(): number {
    return this.width - this.inBin;
  }

  /** Takes the extremes of `count` parts, no more than are wanting. */
  add(lowest: number, highest: number, count: number): void {
    if (lowest < this.lowest) this.lowest = lowest;
    if (highest > this.highest) this.highest = highest;
    this.inBin += count;
    if (this.inBin === this.width) this.close();
  }

  /** Closes the last bin, which may be shorter than the others. */
  end(): void {
    if (this.inBin > 0) this.close();
  }

  /** The closed bins as pairs, in memory that is used again; none are left. */
  take(): Float64Array {
    const taken = this.closed.subarray(0, this.filled);
    this.filled = 0;
    return taken;
  }

  private close(): void {
    if (this.filled === this.closed.length) {
      const longer = new Float64Array(this.closed.length * 2);
      longer.set(this.closed);
      this.closed = longer;
    }
    const empty = this.lowest > this.highest;
    this.closed[this.filled] = empty ? NaN : this.lowest;
    this.closed[this.filled + 1] = empty ? NaN : this.highest;
    this.filled += 2;
    this.inBin = 0;
    this.lowest = Infinity;
    this.highest = -Infinity;
  }
}

/** Builds the pyramid while samples arrive; holds two values for every 512 samples, as the finest level is handed on. */
export class PyramidBuilder {
  private readonly finest = new OpenLevel(baseFactor);
  private readonly second = new OpenLevel(levelRatio);
  private finestBins = 0;

  /** Takes samples; returns the next part of the finest level, valid until the next call. */
  add(samples: Float64Array): Float64Array {
    for (let from = 0; from < samples.length;) {
      const to = Math.min(samples.length, from + this.finest.wanting);
      let lowest = Infinity;
      let highest = -Infinity;
      for (let i = from; i < to; i += 1) {
        const sample = samples[i]!;
        if (sample < lowest) lowest = sample;
        if (sample > highest) highest = sample;
      }
      this.finest.add(lowest, highest, to - from);
      from = to;
    }
    return this.takeFinest();
  }

  /** The rest of the finest level, then every coarser one, in the layout above. */
  finish(): Float64Array[] {
    this.finest.end();
    const rest = this.takeFinest().slice();
    this.second.end();
    if (this.finestBins < 2) return [rest];
    const levels = [this.second.take()];
    while (levels.at(-1)!.length > 2) levels.push(coarser(levels.at(-1)!));
    return [rest, ...levels];
  }

  private takeFinest(): Float64Array {
    const pairs = this.finest.take();
    for (let i = 0; i < pairs.length; i += 2) this.second.add(pairs[i]!, pairs[i + 1]!, 1);
    this.finestBins += pairs.length / 2;
    return pairs;
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
