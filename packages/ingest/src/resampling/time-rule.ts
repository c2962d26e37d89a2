import type { TimeAxis } from '../csv/time-axis.js';
import { refuse } from '../refusal.js';
import type { ImportOptions, SampleSink } from '../types.js';
import { type EvenGrid, UnevenStamps } from './even-grid.js';
import { Resampler } from './resampler.js';

/** Samples that a grid may have for each row: a record of bursts with long pauses would be pauses for the most part. */
const MOST_PER_ROW = 4;

/** What becomes of uneven time stamps in one reading of a file. */
export class TimeRule {
  /**
   * @param grid to which this reading resamples; null in a first reading
   * @param canReadAgain whether a second reading is possible
   */
  constructor(
    private readonly options: ImportOptions,
    private readonly grid: EvenGrid | null,
    private readonly canReadAgain: boolean,
  ) {}

  resampler(channelCount: number, sink: SampleSink): Resampler | null {
    return this.grid === null ? null : new Resampler(this.grid, channelCount, sink);
  }

  /**
   * Judges the stamps of `rows` rows once they are all known. Refuses uneven ones where they are to be refused.
   * @throws UnevenStamps where they are to be resampled. A sample rate that the user gives rules over the stamps.
   */
  settle(axis: TimeAxis, rows: number): void {
    const { unevenTime = 'resample', sampleRateHz } = this.options;
    if (unevenTime === 'refuse') axis.refuseUneven();
    const resamples = unevenTime === 'resample' && sampleRateHz === undefined && this.canReadAgain;
    const grid = resamples && this.grid === null ? axis.evenGrid() : null;
    if (grid === null) return;
    if (!(grid.count <= MOST_PER_ROW * rows)) {
      refuse(
        'uneven-sampling',
        'The time stamps are uneven, with pauses that are longer than the record itself.',
        'Export each part of the record as a file of its own, or have the stamps taken as even.',
      );
    }
    throw new UnevenStamps(grid);
  }
}
