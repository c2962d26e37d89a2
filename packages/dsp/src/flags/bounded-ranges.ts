/** Samples `start` up to, not including, `end`. */
export interface SampleRange {
  start: number;
  end: number;
}

const CAPACITY = 4096;

/**
 * Ranges of samples in rising order, at most 4096 of them whatever the length of the record: when the list is full, the
 * nearer half of the neighbours are joined, and from then on ranges as near as these are joined when they come. A range
 * that was put in stays covered; what lies between joined ranges is covered as well.
 */
export class BoundedRanges {
  private ranges: SampleRange[] = [];
  private joinGap = 0;

  /** @param start not below the start of the range before */
  push(start: number, end: number): void {
    const last = this.ranges[this.ranges.length - 1];
    if (last !== undefined && start - last.end <= this.joinGap) {
      last.end = Math.max(last.end, end);
      return;
    }
    this.ranges.push({ start, end });
    if (this.ranges.length > CAPACITY) this.joinNearest();
  }

  clear(): void {
    this.ranges = [];
    this.joinGap = 0;
  }

  list(): SampleRange[] {
    return this.ranges.map((range) => ({ ...range }));
  }

  private joinNearest(): void {
    const gaps = this.ranges.slice(1).map((range, i) => range.start - this.ranges[i]!.end);
    this.joinGap = gaps.sort((a, b) => a - b)[gaps.length >> 1]!;
    const all = this.ranges;
    this.ranges = [];
    for (const { start, end } of all) this.push(start, end);
  }
}

/** The union of ranges, in rising order and without overlap. */
export function unionOf(ranges: readonly SampleRange[]): SampleRange[] {
  const out = new BoundedRanges();
  for (const { start, end } of [...ranges].sort((a, b) => a.start - b.start)) out.push(start, end);
  return out.list();
}
