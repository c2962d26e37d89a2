/** Instants at equal distances that uneven time stamps are resampled to; times in the unit of the file. */
export interface EvenGrid {
  first: number;
  last: number;
  /** Mean interval between stamps, pauses left out. */
  interval: number;
  /** Instants, the first at the first stamp; the last at the last stamp where there is no pause. */
  count: number;
  /** Stamps farther apart than this have a pause between them, which is never bridged. */
  widest: number;
  secondsPerUnit: number;
}

/** Ends a first reading whose time stamps turned out uneven, so that a second one resamples to `grid`. */
export class UnevenStamps extends Error {
  constructor(readonly grid: EvenGrid) {
    super('the time stamps are uneven');
    this.name = 'UnevenStamps';
  }
}

/** Instant number `index`, counted from 0. */
export function instant(grid: EvenGrid, index: number): number {
  return Math.min(grid.last, grid.first + grid.interval * index);
}
