import { createWindowLines, lineRms, type WindowLinePlan } from './window-lines.js';

export interface SynchronousWindows {
  cycles: number;
  /** rms line spectra, one per window; line k lies at k f0/cycles, order h is line cycles·h. */
  lineRms: Float64Array[];
}

export interface SynchronousWindowOptions {
  /** Called after each window with the share done; throws to stop. */
  onWindow?: ((fraction: number) => void) | undefined;
}

const PLAN_CACHE_SIZE = 4;

/**
 * Line spectra of back-to-back rectangular windows of a whole number of cycles (IEC 61000-4-7, 4.4.1), up to just below
 * order maxOrder + 1 or half the sample rate.
 *
 * @param boundaries positions from `windowBoundaries`
 */
export function synchronousWindows(
  samples: Float64Array,
  boundaries: Float64Array,
  cycles: number,
  maxOrder: number,
  options: SynchronousWindowOptions = {},
): SynchronousWindows {
  const plans = new Map<string, WindowLinePlan>();
  const windows: Float64Array[] = [];
  const count = boundaries.length - 1;
  for (let j = 0; j < count; j++) {
    const start = Math.round(boundaries[j]!);
    const end = Math.min(samples.length, Math.round(boundaries[j + 1]!));
    const windowSamples = boundaries[j + 1]! - boundaries[j]!;
    const key = `${end - start} ${windowSamples.toPrecision(10)}`;
    const plan = plans.get(key) ?? createWindowLines(end - start, windowSamples, cycles, maxOrder);
    if (!plans.has(key)) {
      if (plans.size >= PLAN_CACHE_SIZE) plans.clear();
      plans.set(key, plan);
    }
    const cosine = new Float64Array(plan.lineCount);
    const sine = new Float64Array(plan.lineCount);
    plan.amplitudes(samples, start, cosine, sine);
    windows.push(lineRms(cosine, sine));
    options.onWindow?.((j + 1) / count);
  }
  return { cycles, lineRms: windows };
}
