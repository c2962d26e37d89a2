import {
  centredSubgroup,
  harmonicGroup,
  harmonicSubgroup,
  interharmonicGroup,
  type Group,
} from '../groups/grouping.js';
import { highFrequencyBand } from '../groups/high-frequency-bands.js';
import { wrapDegrees } from '../model/fit-sinusoids.js';
import { createLineAnalysis, type Lines } from './line-analysis.js';
import type { PartContext } from './part-types.js';
import { readStretches, type Reading } from './reading.js';

/** A range of successive synchronous windows. */
export interface WindowPlan {
  /** Positions in samples, one more than windows; may be fractional. */
  boundaries: Float64Array;
  cycles: number;
  /** Orders listed, from 1. */
  orders: number;
  /** Bands of 200 Hz to compute beside them, by their centres. */
  bandCentresHz: Float64Array;
}

/**
 * Figures of successive windows. Two-dimensional arrays hold one row of `count` windows per order, interharmonic group or
 * band, as in `WindowSeries`; NaN where the record ends below a group in frequency.
 */
export interface WindowChunk {
  count: number;
  /** Of all samples of the window. */
  rms: Float64Array;
  /** DC component, line 0 with its sign. */
  dc: Float64Array;
  line: Float64Array;
  phaseDeg: Float64Array;
  group: Float64Array;
  subgroup: Float64Array;
  interharmonicGroup: Float64Array;
  centredSubgroup: Float64Array;
  band: Float64Array;
}

/** Lines, groups and bands of a range of windows (IEC 61000-4-7, 4.4.1, 5.5, 5.6, annexes A and B). */
export function* computeWindows(
  plan: WindowPlan,
  { sampleRateHz, sampleCount }: PartContext,
): Reading<WindowChunk> {
  const { boundaries } = plan;
  const count = boundaries.length - 1;
  const chunk = emptyChunk(count, plan.orders, plan.bandCentresHz.length);
  const linesOf = createLineAnalysis(plan, sampleRateHz);
  const stretchOf = (window: number) => ({
    from: Math.round(boundaries[window]!),
    to: Math.min(sampleCount, Math.round(boundaries[window + 1]!)),
  });
  yield* readStretches({ from: 0, to: count }, stretchOf, (window, samples, offset) => {
    const { from, to } = stretchOf(window);
    const windowSamples = boundaries[window + 1]! - boundaries[window]!;
    const lines = linesOf(samples, offset, to - from, windowSamples);
    chunk.rms[window] = lines.totalRms;
    chunk.dc[window] = lines.cosine[0]!;
    writePhases(chunk, window, plan, lines, boundaries[window]! - from);
    writeGroups(chunk, window, plan, lines.rms);
    const lineHz = sampleRateHz / windowSamples;
    plan.bandCentresHz.forEach((centreHz, band) => {
      chunk.band[band * count + window] = highFrequencyBand(lines.rms, lineHz, centreHz);
    });
  });
  return chunk;
}

/**
 * Puts the chunks of successive ranges of windows together. They are taken one after the other, so that each may be let go
 * of before the next.
 */
export function joinChunks(
  chunks: Iterable<WindowChunk>,
  { count, orders, bands }: { count: number; orders: number; bands: number },
): WindowChunk {
  const whole = emptyChunk(count, orders, bands);
  let at = 0;
  for (const chunk of chunks) {
    if (chunk.count === count) return chunk;
    for (const name of CHUNK_ROWS) {
      const rows = chunk[name].length / chunk.count;
      for (let row = 0; row < rows; row++) {
        whole[name].set(chunk[name].subarray(row * chunk.count, (row + 1) * chunk.count), row * count + at);
      }
    }
    at += chunk.count;
  }
  return whole;
}

const CHUNK_ROWS = [
  ...(['rms', 'dc', 'line', 'phaseDeg', 'group', 'subgroup'] as const),
  ...(['interharmonicGroup', 'centredSubgroup', 'band'] as const),
];

function emptyChunk(count: number, orders: number, bands: number): WindowChunk {
  const rows = (number: number) => new Float64Array(number * count);
  return {
    count,
    ...{ rms: rows(1), dc: rows(1), line: rows(orders), phaseDeg: rows(orders) },
    ...{ group: rows(orders), subgroup: rows(orders) },
    ...{ interharmonicGroup: rows(orders + 1), centredSubgroup: rows(orders + 1), band: rows(bands) },
  };
}

/**
 * Phases of the orders where the window begins.
 *
 * @param start exact beginning of the window, in samples from its first sample
 */
function writePhases(
  chunk: WindowChunk,
  window: number,
  { cycles, orders }: WindowPlan,
  { plan, cosine, sine, rms }: Lines,
  start: number,
): void {
  const turn = ((2 * Math.PI) / plan.windowSamples) * (start - (plan.sampleCount - 1) / 2);
  for (let order = 1; order <= orders; order++) {
    const k = cycles * order;
    const at = (order - 1) * chunk.count + window;
    if (k < plan.lineCount) {
      chunk.line[at] = rms[k]!;
      chunk.phaseDeg[at] = wrapDegrees(((Math.atan2(-sine[k]!, cosine[k]!) + k * turn) * 180) / Math.PI);
    } else {
      chunk.line[at] = NaN;
      chunk.phaseDeg[at] = NaN;
    }
  }
}

function writeGroups(
  chunk: WindowChunk,
  window: number,
  { cycles, orders }: WindowPlan,
  rms: Float64Array,
): void {
  const write = (into: Float64Array, group: Group, first: number) => {
    for (let order = first; order <= orders; order++) {
      into[(order - first) * chunk.count + window] = group(rms, cycles, order) ?? NaN;
    }
  };
  write(chunk.group, harmonicGroup, 1);
  write(chunk.subgroup, harmonicSubgroup, 1);
  write(chunk.interharmonicGroup, interharmonicGroup, 0);
  write(chunk.centredSubgroup, centredSubgroup, 0);
}
