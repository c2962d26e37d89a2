import { complexAbs } from '../linear/complex.js';
import { goldenMaximum } from '../search/golden-maximum.js';
import { turningPoint } from '../search/turning-point.js';
import { responseOf, stagesOf, type StageChain } from './frequency-response.js';
import { poles, zeros } from './transfer-function.js';

/** A maximum of the gain between lower values on both sides. */
export interface ResonancePeak {
  frequencyHz: number;
  gain: number;
  gainDb: number;
  /**
   * Frequency over the width between the points 3.01 dB (1/√2) below the peak; null where the gain does not fall so far on
   * both sides before it rises again.
   */
  quality: number | null;
  /** 1/(2ζ) of the pair of poles nearest in frequency, which is the Q of a stage of second order; null without a pair. */
  poleQuality: number | null;
}

const POINTS_PER_DECADE = 200;
/** A maximum must stand out by this share, or rounding alone could make one. */
const PROMINENCE = 1e-7;

/**
 * Resonance peaks of the gain of stages in series, by frequency. The gain is scanned on a logarithmic grid of 200 points a
 * decade from a tenth of the lowest to ten times the highest pole or zero, made denser about every pair of poles by its own
 * width, so that no resonance is too narrow to be met; each maximum is then found by golden section (J. Kiefer, 1953).
 *
 * @returns empty where the gain has no maximum, as with a plain low-pass; a pole on the imaginary axis has no finite peak
 *   and is not listed
 */
export function resonancePeaks(chain: StageChain): ResonancePeak[] {
  const frequencies = scanFrequencies(chain);
  const response = responseOf(chain);
  const gainAt = (frequencyHz: number) => {
    const value = response(frequencyHz);
    return value === null ? Infinity : complexAbs(value);
  };
  const gains = frequencies.map(gainAt);
  const pairs = stagesOf(chain).flatMap((h) => poles(h).filter(({ re, im }) => im > 0 && re < 0));
  const peaks: ResonancePeak[] = [];
  for (let i = 1; i + 1 < frequencies.length; i++) {
    const [before, here, after] = [gains[i - 1]!, gains[i]!, gains[i + 1]!];
    if (!(here >= before && here > after) || !Number.isFinite(here)) continue;
    const frequencyHz = goldenMaximum(gainAt, frequencies[i - 1]!, frequencies[i + 1]!);
    const gain = gainAt(frequencyHz);
    if (!Number.isFinite(gain) || !standsOut(gains, i, gain)) continue;
    const nearest = nearestPair(pairs, frequencyHz);
    peaks.push({
      frequencyHz,
      gain,
      gainDb: 20 * Math.log10(gain),
      quality: qualityOf(gainAt, frequencies, frequencyHz, gain),
      poleQuality: nearest === null ? null : complexAbs(nearest) / (-2 * nearest.re),
    });
  }
  return peaks;
}

/** Frequencies in Hz, in order, at which nothing that a chain does between can be missed. */
export function scanFrequencies(chain: StageChain): number[] {
  const roots = stagesOf(chain).flatMap((h) => [...poles(h), ...zeros(h)]);
  const corners = roots.map(complexAbs).filter((radius) => radius > 0);
  if (corners.length === 0) return [];
  const low = Math.min(...corners) / (2 * Math.PI) / 10;
  const high = (Math.max(...corners) / (2 * Math.PI)) * 10;
  const near = roots.flatMap(({ re, im }) => {
    if (im <= 0) return [];
    const width = Math.max(Math.abs(re), 1e-9 * im);
    return Array.from({ length: 41 }, (_, k) => {
      const steps = k - 20;
      return (im + Math.sign(steps) * width * (2 ** Math.abs(steps / 2) - 1)) / (2 * Math.PI);
    }).filter((frequency) => frequency > low && frequency < high);
  });
  return [...new Set([...logFrequencies(low, high, POINTS_PER_DECADE), ...near])].sort((a, b) => a - b);
}

/** Logarithmic grid with a number of points for each decade, both ends included. */
export function logFrequencies(fromHz: number, toHz: number, pointsPerDecade: number): number[] {
  const decades = Math.log10(toHz / fromHz);
  const count = Math.max(1, Math.ceil(decades * pointsPerDecade));
  return Array.from({ length: count + 1 }, (_, i) =>
    i === count ? toHz : fromHz * 10 ** ((decades * i) / count),
  );
}

/** True when the gain falls by more than rounding on both sides before it gets higher. */
function standsOut(gains: readonly number[], at: number, gain: number): boolean {
  const falls = (step: -1 | 1) => {
    for (let i = at + step; i >= 0 && i < gains.length; i += step) {
      if (gains[i]! < gain * (1 - PROMINENCE)) return true;
      if (gains[i]! > gain * (1 + PROMINENCE)) return false;
    }
    return false;
  };
  return falls(-1) && falls(1);
}

function nearestPair(pairs: readonly { re: number; im: number }[], frequencyHz: number) {
  const omega = 2 * Math.PI * frequencyHz;
  return pairs.reduce<{ re: number; im: number } | null>(
    (best, pair) => (best === null || Math.abs(pair.im - omega) < Math.abs(best.im - omega) ? pair : best),
    null,
  );
}

function qualityOf(
  gainAt: (f: number) => number,
  frequencies: readonly number[],
  peakHz: number,
  gain: number,
): number | null {
  const level = gain * Math.SQRT1_2;
  const upper = crossing(
    gainAt,
    frequencies.filter((f) => f > peakHz),
    peakHz,
    level,
    gain,
  );
  const lower = crossing(gainAt, frequencies.filter((f) => f < peakHz).reverse(), peakHz, level, gain);
  return upper === null || lower === null ? null : peakHz / (upper - lower);
}

/** Where the gain first falls below a level, walking away from the peak; null where it rises above the peak before. */
function crossing(
  gainAt: (f: number) => number,
  walk: readonly number[],
  start: number,
  level: number,
  gain: number,
): number | null {
  let inside = start;
  for (const frequency of walk) {
    const here = gainAt(frequency);
    if (here > gain * (1 + PROMINENCE)) return null;
    if (here > level) {
      inside = frequency;
      continue;
    }
    return turningPoint((f) => gainAt(f) > level, inside, frequency);
  }
  return null;
}
