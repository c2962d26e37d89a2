import type { FrequencyTrack } from './frequency-track.js';
import { slopeOf } from './local-frequency.js';

/** Wander counts when it exceeds the scatter of neighbouring frames so many times. */
const SCATTERS = 4;
/** Frames of half overlap: every second one is independent of its neighbours. */
const LAG = 2;
const FEWEST_FRAMES = 4 * LAG + 1;

/**
 * Whether the fundamental keeps one frequency between two positions so well that a single model of it can be fitted
 * there: the rms distance of its phase from a straight line stays below a limit, or within what the scatter of the
 * single frames explains (noise). The scatter is taken from second differences of frames that do not overlap, which a
 * slow wander leaves alone (J. von Neumann, Ann. Math. Stat. 12, 1941, for first differences).
 *
 * @param from position in samples
 * @param to position in samples, behind `from`
 * @param limitRad a wander of so many radians (rms) leaves a tone of amplitude 1 with an rms residue of limitRad/√2
 */
export function keepsPhase(
  track: FrequencyTrack | null,
  from: number,
  to: number,
  limitRad: number,
): boolean {
  if (track === null) return true;
  const { centres, deviation } = track;
  const inside = Array.from(centres.keys()).filter((i) => centres[i]! >= from && centres[i]! <= to);
  if (inside.length < FEWEST_FRAMES) return true;
  const x = inside.map((i) => centres[i]!);
  const y = inside.map((i) => deviation[i]!);
  const second = y.slice(2 * LAG).map((value, i) => (value - 2 * y[i + LAG]! + y[i]!) / Math.sqrt(6));
  return rms(fromLine(x, y)) <= Math.max(limitRad, SCATTERS * rms(second));
}

/** Distances from the least-squares line. */
function fromLine(x: readonly number[], y: readonly number[]): number[] {
  const meanX = mean(x);
  const meanY = mean(y);
  const slope = slopeOf(x, y, 0, x.length);
  return y.map((value, i) => value - meanY - slope * (x[i]! - meanX));
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

function rms(values: readonly number[]): number {
  return Math.sqrt(mean(values.map((value) => value * value)));
}
