import type { AnalysisPart } from '../parts/part-types.js';
import { partSamples } from '../parts/run-part.js';

/** Shares of the work that are done when the first, second and third batch end, roughly. */
const BATCH_ENDS = [0.15, 0.25, 1];

/** Tells how much of an analysis is done, from the samples that its parts look at. Never falls. */
export interface Progress {
  /** The next batch begins. */
  begin(parts: readonly AnalysisPart[]): void;
  /** The share of one of its parts that is done, 0 to 1. */
  report(part: AnalysisPart, share: number): void;
  /** Everything is done. */
  finish(): void;
}

export function createProgress(onProgress: ((fraction: number) => void) | undefined): Progress {
  let batch = -1;
  let total = 0;
  let reported = 0;
  const shares = new Map<AnalysisPart, number>();

  function tell(fraction: number): void {
    if (fraction <= reported) return;
    reported = fraction;
    onProgress?.(fraction);
  }

  return {
    begin(parts) {
      batch++;
      shares.clear();
      total = parts.reduce((sum, part) => sum + partSamples(part), 0);
    },
    report(part, share) {
      shares.set(part, share);
      let done = 0;
      for (const [each, value] of shares) done += value * partSamples(each);
      const from = BATCH_ENDS[batch - 1] ?? 0;
      const to = BATCH_ENDS[batch] ?? 1;
      tell(from + (to - from) * Math.min(1, done / total));
    },
    finish: () => tell(1),
  };
}
