import type { Flag } from '../types.js';
import { firstTimes, MAX_TIMES, timesInWords } from './evidence.js';
import type { ScanFindings } from './flag-scan.js';
import type { Jump } from './jump-watch.js';

const OUTSTANDING = 4;
const MIN_SHARE_OF_SPAN = 0.02;
/** Jumps that are reported where no cycle is known that they could recur in. */
const MOST_WITHOUT_CYCLE = 5;
/** Steps of a periodic signal recur at least once a cycle; faults are rarer than one in this many cycles. */
const CYCLES_PER_JUMP = 2;

/**
 * Isolated places where the waveform jumps as nowhere else: the third difference there is more than four times that of
 * all other places. Steps that belong to the signal (square waves, phase control) recur every cycle and are not
 * reported. Common practice; no standard defines this check.
 *
 * @param frequencyHz fundamental, null when there is none
 */
export function discontinuityFlag(
  findings: ScanFindings,
  sampleRateHz: number,
  frequencyHz: number | null,
  unit: string,
): Flag | null {
  const jumps = isolatedJumps(findings, sampleRateHz, frequencyHz);
  if (jumps.length === 0) return null;
  const timesS = firstTimes(
    jumps.map((jump) => jump.at),
    sampleRateHz,
  );
  return {
    code: 'discontinuity',
    severity: 'warning',
    message:
      `The waveform jumps at ${timesInWords(timesS, jumps.length)} in a way the rest of the record rules out; ` +
      'samples may be missing. Analyse a span without the jump or record again.',
    evidence: {
      count: jumps.length,
      timesS,
      value: jumps[0]!.size,
      limit: OUTSTANDING * findings.jumps[jumps.length]!.size,
      unit: unit === '' ? null : unit,
    },
  };
}

/** The jumps that stand out of the rest of the record, in falling order of size. */
export function isolatedJumps(
  { jumps, highest, lowest, sampleCount }: ScanFindings,
  sampleRateHz: number,
  frequencyHz: number | null,
): Jump[] {
  const cycles = frequencyHz === null ? null : (sampleCount * frequencyHz) / sampleRateHz;
  const most = Math.min(
    jumps.length - 1,
    cycles === null ? MOST_WITHOUT_CYCLE : Math.floor(cycles / CYCLES_PER_JUMP),
    MAX_TIMES,
  );
  for (let i = 0; i < most; i++) {
    if (jumps[i]!.size < MIN_SHARE_OF_SPAN * (highest - lowest)) return [];
    if (jumps[i]!.size > OUTSTANDING * jumps[i + 1]!.size) return jumps.slice(0, i + 1);
  }
  return [];
}
