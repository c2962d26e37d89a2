import type { Flag } from '../types.js';

const MAX_JUMPS = 5;
const OUTSTANDING = 4;
const MIN_SHARE_OF_SPAN = 0.02;
/** Differences within this many samples belong to one jump. */
const CLUSTER = 4;

interface Jump {
  at: number;
  size: number;
}

/**
 * Isolated places where the waveform jumps as nowhere else: the third difference there is more than four times that of
 * all other places. Steps that belong to the signal (square waves, phase control) recur every cycle and are not
 * reported. Common practice; no standard defines this check.
 */
export function discontinuityFlag(samples: Float64Array, sampleRateHz: number, span: number): Flag | null {
  const jumps = largestJumps(samples);
  for (let i = 0; i < Math.min(MAX_JUMPS, jumps.length - 1); i++) {
    const here = jumps[i]!.size;
    if (here < MIN_SHARE_OF_SPAN * span) return null;
    if (here <= OUTSTANDING * jumps[i + 1]!.size) continue;
    const times = jumps
      .slice(0, i + 1)
      .map((jump) => jump.at / sampleRateHz)
      .sort((a, b) => a - b);
    return {
      code: 'discontinuity',
      severity: 'warning',
      message:
        `The waveform jumps at ${times.map((t) => `${t.toPrecision(5)} s`).join(', ')} in a way the rest of the record rules out; ` +
        'samples may be missing. Analyse a span without the jump or record again.',
    };
  }
  return null;
}

/** The largest third differences, one per cluster, in falling order. */
function largestJumps(samples: Float64Array): Jump[] {
  const found: Jump[] = [];
  let smallestKept = 0;
  for (let n = 3; n < samples.length; n++) {
    const size = Math.abs(samples[n]! - samples[n - 3]! - 3 * (samples[n - 1]! - samples[n - 2]!));
    if (size <= smallestKept) continue;
    const last = found.find((jump) => n - jump.at <= CLUSTER);
    if (last) {
      if (size > last.size) Object.assign(last, { at: n, size });
    } else {
      found.push({ at: n, size });
    }
    found.sort((a, b) => b.size - a.size);
    if (found.length > MAX_JUMPS + 1) found.pop();
    if (found.length > MAX_JUMPS) smallestKept = found[found.length - 1]!.size;
  }
  return found;
}
