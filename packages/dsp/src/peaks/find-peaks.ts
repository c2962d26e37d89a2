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
/** A peak wider than this, at a quarter of its power, is no steady line. */
const STEADY_WIDTH = 4;
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
  const { smallestShare, most } = search;
  const ranges = peakRanges(search).sort((a, b) => b.top - a.top);
  const threshold = smallestShare * (ranges[0]?.top ?? 0);
  const found: Peak[] = [];
  for (const range of ranges.slice(0, TRIED * most)) {
    if (range.top < threshold || found.length >= most) break;
    if (!isSideLobe(range, found, search.transform)) found.push(describePeak(range, search));
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

function peakRanges({ power, floor }: PeakSearch): PeakRange[] {
  const threshold = Math.log(power.length / FALSE_PEAKS);
  const ranges: PeakRange[] = [];
  for (let k = 2; k < power.length - 1; k++) {
    const here = power[k]!;
    if (here <= threshold * floor[k]! || here < power[k - 1]! || here <= power[k + 1]!) continue;
    const last = ranges.at(-1);
    if (last && lowestBetween(power, last.at, k) > VALLEY_SHARE * Math.min(here, last.top)) {
      ranges[ranges.length - 1] = joined(last, { from: k, at: k, to: k, top: here });
    } else {
      ranges.push({ from: k, at: k, to: k, top: here });
    }
  }
  for (const range of ranges) {
    while (range.from > 1 && power[range.from - 1]! > VALLEY_SHARE * range.top) range.from--;
    while (range.to < power.length - 2 && power[range.to + 1]! > VALLEY_SHARE * range.top) range.to++;
  }
  return ranges;
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

function describePeak(
  { from, at, to, top }: PeakRange,
  { power, floor, transform, enbwLines }: PeakSearch,
): Peak {
  const noise = NOISE_UNCERTAINTY * Math.sqrt(floor[at]! / top);
  if (to - from + 1 <= STEADY_WIDTH) {
    return { ...interpolatePeak(power, at, transform), uncertainty: Math.hypot(SMALLEST_UNCERTAINTY, noise) };
  }
  let sum = 0;
  let moment = 0;
  for (let k = from; k <= to; k++) {
    sum += power[k]!;
    moment += k * power[k]!;
  }
  return { line: moment / sum, power: sum / enbwLines, uncertainty: Math.hypot((to - from) / 4, noise) };
}
