import { unionOf, type SampleRange } from './bounded-ranges.js';
import { clippedCrests } from './clipped.js';
import { isolatedJumps } from './discontinuity.js';
import type { ScanFindings } from './flag-scan.js';

/** Samples that a third difference spans. */
const JUMP_REACH = 3;

/**
 * Samples that are wrong: clipped crests, saturated runs and jumps. In rising order, without overlap, a few thousand at
 * most: in a record with more faults than that, neighbouring ones are joined.
 *
 * @param frequencyHz fundamental, null when there is none
 */
export function badRanges(
  findings: ScanFindings,
  sampleRateHz: number,
  frequencyHz: number | null,
): SampleRange[] {
  const { top, bottom } = clippedCrests(findings);
  return unionOf([
    ...(top?.ranges ?? []),
    ...(bottom?.ranges ?? []),
    ...findings.top.saturated.ranges,
    ...findings.bottom.saturated.ranges,
    ...isolatedJumps(findings, sampleRateHz, frequencyHz).map(({ at }) => ({
      start: at - JUMP_REACH,
      end: at + 1,
    })),
  ]);
}
