import { thdF } from '../figures/distortion.js';
import type { SampleRange } from '../flags/bounded-ranges.js';
import { meanFrequencyHz } from '../fundamental/local-frequency.js';
import { weightedDistortion } from '../groups/weighted-distortion.js';
import type { WindowChunk } from '../parts/window-chunk.js';
import { windowCount, type WindowGrid } from '../stages/window-grid.js';
import type { WindowSeries } from '../types.js';

export interface SeriesContext {
  sampleRateHz: number;
  thdMaxOrder: number;
  /** false leaves the distortion out: there is no fundamental of the channel to relate to. */
  periodic: boolean;
  /** Samples that are wrong, in rising order. */
  badRanges: readonly SampleRange[];
}

/** The figures of a channel window by window. */
export function windowSeries(chunk: WindowChunk, grid: WindowGrid, context: SeriesContext): WindowSeries {
  const { sampleRateHz, thdMaxOrder, periodic, badRanges } = context;
  const { count } = chunk;
  const { boundaries, orders, bandCentresHz } = grid;
  const percent = (ratio: (rms: Float64Array) => number | null, rows: Float64Array) =>
    periodic ? perWindow(rows, orders, count, ratio) : new Float64Array(count).fill(NaN);
  const thd = (rms: Float64Array) => thdF(rms, thdMaxOrder);
  return {
    count,
    intervalS: boundaries[count]! / count / sampleRateHz,
    startS: boundaries.slice(0, count).map((position) => position / sampleRateHz),
    flagged: flaggedWindows(boundaries, badRanges),
    frequencyHz: windowFrequencies(grid, sampleRateHz),
    rms: chunk.rms,
    thd: percent(thd, chunk.line),
    thdg: percent(thd, chunk.group),
    thds: percent(thd, chunk.subgroup),
    pwhd: percent(weightedDistortion, chunk.line),
    orders,
    line: chunk.line,
    group: chunk.group,
    subgroup: chunk.subgroup,
    phaseDeg: chunk.phaseDeg,
    interharmonicGroup: chunk.interharmonicGroup,
    centredSubgroup: chunk.centredSubgroup,
    bandCentresHz,
    band: chunk.band,
  };
}

/** Mean frequency of the channel that sets the windows, in each of them. */
export function windowFrequencies(grid: WindowGrid, sampleRateHz: number): Float64Array {
  const { boundaries, track, frequencyHz } = grid;
  return Float64Array.from({ length: windowCount(grid) }, (_, j) =>
    track === null ? frequencyHz : meanFrequencyHz(track, sampleRateHz, boundaries[j]!, boundaries[j + 1]!),
  );
}

/** 1 for each window that touches one of the ranges. */
function flaggedWindows(boundaries: Float64Array, ranges: readonly SampleRange[]): Uint8Array {
  const flagged = new Uint8Array(boundaries.length - 1);
  let window = 0;
  for (const { start, end } of ranges) {
    while (window < flagged.length && boundaries[window + 1]! <= start) window++;
    for (let j = window; j < flagged.length && boundaries[j]! < end; j++) flagged[j] = 1;
  }
  return flagged;
}

/** 100 times a ratio of the orders in each window; NaN where it does not apply. Orders that are not there count as 0. */
function perWindow(
  rows: Float64Array,
  orders: number,
  count: number,
  ratio: (rms: Float64Array) => number | null,
): Float64Array {
  const rms = new Float64Array(orders);
  return Float64Array.from({ length: count }, (_, j) => {
    for (let i = 0; i < orders; i++) {
      const value = rows[i * count + j]!;
      rms[i] = Number.isNaN(value) ? 0 : value;
    }
    return 100 * (ratio(rms) ?? NaN);
  });
}
