import { linesForBands } from '../groups/high-frequency-bands.js';
import { createWindowLines, type WindowLinePlan } from '../groups/window-lines.js';
import type { WindowPlan } from './window-chunk.js';

/** The lines of one window. */
export interface Lines {
  plan: WindowLinePlan;
  /** Peak amplitudes as in `WindowLinePlan`. */
  cosine: Float64Array;
  sine: Float64Array;
  /** rms values; line 0 is the magnitude of the mean. */
  rms: Float64Array;
  /** Of all samples of the window. */
  totalRms: number;
}

/** Takes the window of `sampleCount` samples from `start`, exactly `windowSamples` long. */
export type LineAnalysis = (
  samples: Float64Array,
  start: number,
  sampleCount: number,
  windowSamples: number,
) => Lines;

/** Window lengths kept: those that a mains frequency takes within some minutes. About 60 MB. */
const MOST_PLANS = 160;

/** Differences beyond are rounding of the positions of the windows. */
const LENGTH_DIGITS = 11;

/** Plans used last, the oldest first; shared by all parts that a thread computes. */
const plans = new Map<string, Lines>();

/** Line analysis of the windows of a plan; the arrays it answers hold until the next call. */
export function createLineAnalysis(
  { cycles, orders, bandCentresHz }: WindowPlan,
  sampleRateHz: number,
): LineAnalysis {
  return (samples, start, sampleCount, windowSamples) => {
    const count = Math.max(cycles * (orders + 1), linesForBands(bandCentresHz, sampleRateHz / windowSamples));
    // Rounded, so that the figures do not depend on which of nearly equal windows a thread comes upon first.
    const length = Number(windowSamples.toPrecision(LENGTH_DIGITS));
    const key = `${sampleCount} ${length} ${cycles} ${orders} ${count}`;
    const lines =
      plans.get(key) ?? prepareLines(createWindowLines(sampleCount, length, cycles, orders, count));
    plans.delete(key);
    plans.set(key, lines);
    for (const [oldest] of plans) {
      if (plans.size <= MOST_PLANS) break;
      plans.delete(oldest);
    }
    const { plan, cosine, sine, rms } = lines;
    lines.totalRms = plan.amplitudes(samples, start, cosine, sine, rms);
    return lines;
  };
}

function prepareLines(plan: WindowLinePlan): Lines {
  const array = () => new Float64Array(plan.lineCount);
  return { plan, cosine: array(), sine: array(), rms: array(), totalRms: 0 };
}
