import { interpolatePeak } from './interpolate-peak.js';

/** A peak of a power spectrum, places counted in lines. */
export interface Peak {
  line: number;
  /** Power of the steady line it stands for. */
  power: number;
  /** Standard deviation of its place. */
  uncertainty: number;
}

export interface PeakSearch {
  /** Power per line from DC, scaled so that a steady line shows its own power. */
  power: Float64Array;
  /** Mean noise power per line. */
  floor: Float64Array;
  /** Periodograms averaged in each line, default 1. */
  averages?: number | undefined;
  /** Transform of the window by distance in lines, relative to its peak. */
  transform: (lines: number) => number;
  /** Equivalent noise bandwidth of the window in lines. */
  enbwLines: number;
  /** Peaks below this share of the power of the largest are left out. */
  smallestShare: number;
  most: number;
}

/** Expected number of noise lines taken for peaks in a whole spectrum. */
const FALSE_PEAKS = 0.01;
/** Two maxima are one peak when the power between them stays above this share of the lower one. */
const VALLEY_SHARE = 0.25;
/** Two such maxima make a broad peak; below this share of the other one, a maximum is only a bump on its slope. */
const BUMP_SHARE = 0.1;
/** How far down the flanks of a broad peak its power is summed. */
const FLANK_SHARE = 0.02;
/** Lines that a steady line may be wide at a quarter of its power: beside these, a share of the noise bandwidth. */
const STEADY_WIDTH = 2;
const STEADY_BANDWIDTHS = 1.3;
/** A peak must exceed the side lobes of larger ones this many times in power. */
const ABOVE_SIDE_LOBES = 4;
/** Interpolation between lines is no better than this, noise or not. */
const SMALLEST_UNCERTAINTY = 0.05;
/** Of the interpolated place, times the root of noise over signal (about twice the Cramér-Rao bound). */
const NOISE_UNCERTAINTY = 0.6;
/** Maxima looked at for each peak asked for. */
const TRIED = 8;

/**
 * Local maxima that stand out of the noise floor and of the side lobes of larger ones, largest first. A steady line is
 * interpolated between lines of the spectrum; a peak broadened by a moving frequency is taken as a whole: the sum of its
 * power at its centre of gravity.
 */
export function findPeaks(search: PeakSearch): Peak[] {
  const { power, floor, transform, enbwLines, smallestShare, most } = search;
  const steadyWidth = Math.ceil(STEADY_WIDTH + STEADY_BANDWIDTHS * enbwLines);
  // What stands above the mean of the noise is the best guess at the power of the line itself.
  const excess = power.map((p, k) => Math.max(0, p - floor[k]!));
  const ranges = peakRanges(search, excess).sort((a, b) => b.top - a.top);
  const threshold = smallestShare * (ranges[0]?.top ?? 0);
  const dc: Peak = { line: 0, power: 2 * power[0]!, uncertainty: 0 };
  const found: Peak[] = [];
  const broad: PeakRange[] = [];
  for (const range of ranges.slice(0, TRIED * most)) {
    if (range.top < threshold || found.length >= most) break;
    const taken = broad.some(({ from, to }) => range.at >= from && range.at <= to);
    if (taken || isSideLobe(range, [dc, ...found], transform)) continue;
    const core = widened(range, excess, VALLEY_SHARE);
    if (core.to - core.from < steadyWidth) {
      found.push(steadyPeak(range, search, excess));
    } else {
      const whole = widened(core, excess, FLANK_SHARE);
      // A hump whose flank runs into that of a larger one is part of it.
      if (broad.some(({ at }) => at >= whole.from && at <= whole.to)) continue;
      found.push(broadPeak(whole, search, excess, core.to - core.from));
      broad.push(whole);
    }
  }
  return found.sort((a, b) => b.power - a.power);
}

/** Lines `from` to `to` (included) around the maximum at `at`. */
interface PeakRange {
  from: number;
  at: number;
  to: number;
  top: number;
}

function peakRanges({ power, floor, averages = 1 }: PeakSearch, excess: Float64Array): PeakRange[] {
  const threshold = noiseThreshold(power.length / FALSE_PEAKS, averages);
  const ranges: PeakRange[] = [];
  for (let k = 2; k < power.length - 1; k++) {
    const here = power[k]!;
    if (here <= threshold * floor[k]! || here < power[k - 1]! || here <= power[k + 1]!) continue;
    const range = { from: k, at: k, to: k, top: excess[k]! };
    const last = ranges.at(-1);
    if (last && lowestBetween(excess, last.at, k) > VALLEY_SHARE * Math.min(range.top, last.top)) {
      ranges[ranges.length - 1] = joined(last, range);
    } else {
      ranges.push(range);
    }
  }
  return ranges;
}

/**
 * What a mean of exponentially distributed powers exceeds, relative to its expectation, less than once in `odds` lines: the
 * logarithm for a single one, otherwise by the cube-root approximation of E. B. Wilson and M. M. Hilferty (1931).
 */
function noiseThreshold(odds: number, averages: number): number {
  const logOdds = Math.log(odds);
  if (averages === 1) return logOdds;
  const variance = 1 / (9 * averages);
  return (1 - variance + Math.sqrt(2 * logOdds * variance)) ** 3;
}

function joined(left: PeakRange, right: PeakRange): PeakRange {
  const [higher, lower] = right.top > left.top ? [right, left] : [left, right];
  return lower.top < BUMP_SHARE * higher.top ? higher : { ...higher, from: left.from, to: right.to };
}

function lowestBetween(power: Float64Array, from: number, to: number): number {
  let lowest = Infinity;
  for (let k = from; k <= to; k++) if (power[k]! < lowest) lowest = power[k]!;
  return lowest;
}

function isSideLobe(
  { at, top }: PeakRange,
  larger: readonly Peak[],
  transform: PeakSearch['transform'],
): boolean {
  return larger.some(({ line, power }) => {
    const lobe = envelope(transform, Math.abs(at - line));
    return top < ABOVE_SIDE_LOBES * power * lobe * lobe;
  });
}

/** The largest magnitude of the transform within half a line. */
function envelope(transform: PeakSearch['transform'], lines: number): number {
  return [-0.5, -0.25, 0, 0.25, 0.5].reduce(
    (max, step) => Math.max(max, Math.abs(transform(lines + step))),
    0,
  );
}

function steadyPeak({ at, top }: PeakRange, { floor, transform }: PeakSearch, excess: Float64Array): Peak {
  const uncertainty = Math.hypot(SMALLEST_UNCERTAINTY, noiseUncertainty(floor[at]!, top));
  return { ...interpolatePeak(excess, at, transform), uncertainty };
}

function broadPeak(
  { from, at, to, top }: PeakRange,
  { floor, enbwLines }: PeakSearch,
  excess: Float64Array,
  width: number,
): Peak {
  let sum = 0;
  let moment = 0;
  for (let k = from; k <= to; k++) {
    sum += excess[k]!;
    moment += k * excess[k]!;
  }
  const uncertainty = Math.hypot(width / 4, noiseUncertainty(floor[at]!, top));
  return { line: moment / sum, power: sum / enbwLines, uncertainty };
}

function noiseUncertainty(noise: number, top: number): number {
  return NOISE_UNCERTAINTY * Math.sqrt(noise / top);
}

/** The range extended on either side as long as the power stays above a share of the top. */
function widened({ from, at, to, top }: PeakRange, excess: Float64Array, share: number): PeakRange {
  let [low, high] = [from, to];
  while (low > 1 && excess[low - 1]! > share * top) low--;
  while (high < excess.length - 2 && excess[high + 1]! > share * top) high++;
  return { from: low, at, to: high, top };
}
