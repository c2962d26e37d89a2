import { AnalysisStopped } from '../errors.js';
import { trackFrames, trackLayout } from '../fundamental/frequency-track.js';
import { fitPhasorSet } from '../power/fit-phasor-set.js';
import type { PhasorSet } from '../power/types.js';
import { toneFigures } from '../tone/tone-figures.js';
import type { ToneResult } from '../tone/tone-result.js';
import type { AnalyseOptions } from '../types.js';
import { scanChannel } from './channel-scan.js';
import { locateFundamental } from './locate-fundamental.js';
import type { AnalysisPart, OrdersPart, PartResult, TonePart } from './part-types.js';
import {
  readFromMemory,
  readFromSource,
  type Reading,
  type ReadSamples,
  type SampleRange,
} from './reading.js';
import { sumSegments } from './spectrum-segments.js';
import { toneOptions } from './tone-options.js';
import { computeWindows } from './window-chunk.js';

/**
 * Computes one part of an analysis; parts of one record may be computed in any order and in any thread.
 *
 * @throws AnalysisInputError for samples that cannot be analysed
 * @throws AnalysisStopped when `shouldStop` answers true
 */
export function computePart(
  part: AnalysisPart,
  read: ReadSamples,
  options: AnalyseOptions = {},
): Promise<PartResult> {
  const readChannel = (from: number, to: number) => read(part.channel.index, from, to);
  return readFromSource(readingOf(part), readChannel, watch(part, options));
}

/** As `computePart`, at once, with the samples of the channel in memory. */
export function computePartInMemory(
  part: AnalysisPart,
  samples: Float64Array,
  options: AnalyseOptions = {},
): PartResult {
  return readFromMemory(readingOf(part), samples, watch(part, options));
}

/** Samples that a part looks at, for the share of the work that is done. */
export function partSamples(part: AnalysisPart): number {
  switch (part.kind) {
    case 'track': {
      const { hopSamples } = trackLayout(part.sampleCount, part.sampleRateHz, part.carrierHz);
      return hopSamples * (part.frames.to - part.frames.from);
    }
    case 'spectrum':
      return part.plan.segmentLength * (part.segments.to - part.segments.from);
    case 'tone':
      return part.stretch.to - part.stretch.from;
    case 'windows': {
      const { boundaries } = part.plan;
      return boundaries[boundaries.length - 1]! - boundaries[0]!;
    }
    case 'locate':
    case 'scan':
    case 'orders':
      return part.sampleCount;
  }
}

function readingOf(part: AnalysisPart): Reading<PartResult> {
  switch (part.kind) {
    case 'locate':
      return locateFundamental(part);
    case 'scan':
      return scanChannel(part, part.fundamentalHz);
    case 'track': {
      const layout = trackLayout(part.sampleCount, part.sampleRateHz, part.carrierHz);
      return trackFrames(layout, part.sampleRateHz, part.carrierHz, part.frames);
    }
    case 'spectrum':
      return sumSegments(part.plan, part.segments);
    case 'orders':
      return fitOrders(part);
    case 'tone':
      return measureTone(part);
    case 'windows':
      return computeWindows(part.plan, part);
  }
}

function* fitOrders({ sampleRateHz, sampleCount, settings, fundamentalHz }: OrdersPart): Reading<PhasorSet> {
  const samples = yield { from: 0, to: sampleCount };
  return fitPhasorSet(samples, sampleRateHz, fundamentalHz, settings.maxOrder);
}

function* measureTone(part: TonePart): Reading<ToneResult> {
  const samples = yield part.stretch;
  return toneFigures(samples, part.sampleRateHz, part.fundamentalHz, toneOptions(part));
}

/** Tells how far a part has come and stops it between two ranges. */
function watch(part: AnalysisPart, { onProgress, shouldStop }: AnalyseOptions): (range: SampleRange) => void {
  const total = partSamples(part);
  let read = 0;
  return ({ from, to }) => {
    if (shouldStop?.()) throw new AnalysisStopped();
    onProgress?.(Math.min(1, read / total));
    read += to - from;
  };
}
