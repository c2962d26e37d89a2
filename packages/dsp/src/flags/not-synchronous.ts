import type { Flag } from '../types.js';
import { firstTimes } from './evidence.js';

/** Windows of a record with what they miss of whole cycles. */
export interface WindowSynchronism {
  /** First sample of each window. */
  starts: ArrayLike<number>;
  /** Deviation of each window from whole cycles in percent of its length. */
  errorPercent: ArrayLike<number>;
}

/** IEC 61000-4-7, 4.4.1: the window and its whole cycles agree within ±0.03 %. */
const LIMIT_PERCENT = 0.03;

/** Windows whose length deviates from whole cycles of the fundamental by more than IEC 61000-4-7 allows. */
export function notSynchronousFlag(windows: WindowSynchronism | null, sampleRateHz: number): Flag | null {
  if (windows === null) return null;
  const { starts, errorPercent } = windows;
  const outside: number[] = [];
  let largest = 0;
  for (let j = 0; j < errorPercent.length; j++) {
    const error = Math.abs(errorPercent[j]!);
    if (!(error > LIMIT_PERCENT)) continue;
    outside.push(starts[j]!);
    if (error > largest) largest = error;
  }
  if (outside.length === 0) return null;
  const share = outside.length === 1 ? '1 window' : `${outside.length} windows`;
  return {
    code: 'not-synchronous',
    severity: 'warning',
    message:
      `The length of ${share} of ${errorPercent.length} deviates from whole cycles by more than ${LIMIT_PERCENT} %, ` +
      `at most by ${largest.toPrecision(2)} % (IEC 61000-4-7, 4.4.1): high orders read low and the fundamental ` +
      'leaks into its neighbours. Analyse a span with a steady frequency.',
    evidence: {
      count: outside.length,
      timesS: firstTimes(outside, sampleRateHz),
      value: largest,
      limit: LIMIT_PERCENT,
      unit: '%',
    },
  };
}
