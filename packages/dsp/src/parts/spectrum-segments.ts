import { createSegmentPower } from '../spectrum/segment-power.js';
import { segmentLength } from '../spectrum/segment-length.js';
import type { ResolvedSettings, SpectrumResult } from '../types.js';
import { windowSums } from '../windows/window-gains.js';
import { windowSamples, type WindowName } from '../windows/window-samples.js';
import type { IndexRange } from './part-types.js';
import { readStretches, type Reading } from './reading.js';

/** Which segments of a record its averaged spectrum is made of. */
export interface SpectrumPlan {
  window: WindowName;
  kaiserBeta: number | undefined;
  segmentLength: number;
  /** From the start of one segment to that of the next, may be fractional. */
  strideSamples: number;
  segments: number;
}

/** Sum of the periodograms of some segments. */
export interface SpectrumSum {
  power: Float64Array;
  segments: number;
}

/** The spectrum is only drawn in these profiles, so that many segments, spread over the record, are enough. */
const MOST_DRAWN_SEGMENTS = 16;
const DEFAULT_OVERLAP_PERCENT = 50;

/**
 * Segments of the averaged spectrum. `general` takes all of them (P. D. Welch, IEEE Trans. AU-15, 1967). The other
 * profiles take their figures elsewhere and draw the spectrum only: of a long record they average 16 segments spread
 * evenly from its start to its end.
 */
export function planSpectrum(sampleCount: number, settings: ResolvedSettings): SpectrumPlan {
  const length = Math.min(
    sampleCount,
    settings.segmentLength ?? segmentLength(sampleCount, settings.profile),
  );
  const overlap = (settings.overlapPercent ?? DEFAULT_OVERLAP_PERCENT) / 100;
  const hop = Math.max(1, length - Math.floor(overlap * length));
  const all = Math.floor((sampleCount - length) / hop) + 1;
  const spread = settings.profile !== 'general' && all > MOST_DRAWN_SEGMENTS;
  return {
    window: settings.window,
    kaiserBeta: settings.kaiserBeta,
    segmentLength: length,
    strideSamples: spread ? (sampleCount - length) / (MOST_DRAWN_SEGMENTS - 1) : hop,
    segments: spread ? MOST_DRAWN_SEGMENTS : all,
  };
}

/** Periodograms of a range of segments, summed. The mean is left in, so that line 0 shows DC. */
export function* sumSegments(plan: SpectrumPlan, segments: IndexRange): Reading<SpectrumSum> {
  const length = plan.segmentLength;
  const periodograms = createSegmentPower(windowSamples(plan.window, length, plan.kaiserBeta), false);
  const stretchOf = (segment: number) => {
    const from = Math.floor(segment * plan.strideSamples);
    return { from, to: from + length };
  };
  yield* readStretches(segments, stretchOf, (_, samples, offset) => periodograms.add(samples, offset));
  return { power: periodograms.sum, segments: segments.to - segments.from };
}

/** One-sided rms amplitudes, DC to half the sample rate; scaling as in Heinzel, Rüdiger, Schilling 2002, section 9. */
export function finishSpectrum(
  plan: SpectrumPlan,
  sums: readonly SpectrumSum[],
  sampleRateHz: number,
): SpectrumResult {
  const length = plan.segmentLength;
  const { sum, squares } = windowSums(windowSamples(plan.window, length, plan.kaiserBeta));
  const power = new Float64Array(sums[0]!.power.length);
  for (const part of sums) for (let k = 0; k < power.length; k++) power[k]! += part.power[k]!;
  const segments = sums.reduce((total, part) => total + part.segments, 0);
  const rms = power.map((value, k) => {
    const single = k === 0 || 2 * k === length;
    return Math.sqrt(((single ? 1 : 2) * value) / segments) / sum;
  });
  return {
    startHz: 0,
    stepHz: sampleRateHz / length,
    rms,
    window: plan.window,
    noiseBandwidthHz: (sampleRateHz * squares) / (sum * sum),
    segments,
  };
}
