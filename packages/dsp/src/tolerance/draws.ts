import { AnalysisInputError } from '../errors.js';
import { checkSpreads, nominalValues, type ComponentSpread, type Figures } from './spread.js';
import { seededSource, type RandomSource } from './xoshiro.js';

/** Largest number of draws of one study. */
export const MAX_DRAWS = 100_000;

export interface DrawOptions {
  /** At least 1. */
  draws: number;
  /** The same seed gives the same draws. */
  seed: number;
  /** Percentiles to give besides minimum, median and maximum, default 5 and 95. */
  percentiles?: readonly number[];
  /** What must hold, seen the figures and the values of a draw; the share of draws for which it does is counted. */
  holds?: (figures: ArrayLike<number>, values: Float64Array) => boolean;
}

/** Distribution of one figure over the draws; null where no draw has it. */
export interface DrawRange {
  nominal: number;
  min: number | null;
  median: number | null;
  max: number | null;
  /** By the percentiles asked for, nearest rank. */
  percentiles: (number | null)[];
}

export interface DrawResult {
  figures: DrawRange[];
  draws: number;
  seed: number;
  /** Draws in which a figure does not exist (NaN), as behind a stage that became unstable. */
  drawsWithout: number;
  /** Draws for which the condition holds; null without one. */
  holding: { count: number; share: number; lower: number; upper: number } | null;
}

/** Normal quantile of a two-sided 95 % interval. */
const Z_95 = 1.959963984540054;
const DEFAULT_PERCENTILES = [5, 95];

/**
 * Distribution of figures when the components are drawn at random within their tolerances, independently (Monte Carlo,
 * JCGM 101:2008). `holding` gives the share of draws with its 95 % interval (E. B. Wilson, J. Am. Stat. Assoc. 22, 1927).
 *
 * @throws AnalysisInputError for a number of draws that is not from 1 to 100 000, or percentiles that are not within 0..100
 */
export function drawStudy(
  spreads: readonly ComponentSpread[],
  figuresOf: Figures,
  options: DrawOptions,
): DrawResult {
  const { draws, seed, percentiles = DEFAULT_PERCENTILES, holds } = options;
  checkSpreads(spreads);
  checkOptions(draws, seed, percentiles);
  const source = seededSource(seed);
  const values = nominalValues(spreads);
  const nominal = Float64Array.from(figuresOf(values));
  const found = Array.from(nominal, () => new Float64Array(draws));
  let count = 0;
  let drawsWithout = 0;
  for (let draw = 0; draw < draws; draw++) {
    spreads.forEach((spread, i) => (values[i] = drawn(spread, source)));
    const figures = figuresOf(values);
    let isWhole = true;
    for (let k = 0; k < found.length; k++) {
      found[k]![draw] = figures[k]!;
      if (Number.isNaN(figures[k]!)) isWhole = false;
    }
    if (!isWhole) drawsWithout++;
    if (holds?.(figures, values)) count++;
  }
  return {
    figures: found.map((all, k) => describe(nominal[k]!, all, percentiles)),
    ...{ draws, seed, drawsWithout },
    holding: holds === undefined ? null : { count, ...wilson(count, draws) },
  };
}

function checkOptions(draws: number, seed: number, percentiles: readonly number[]): void {
  if (!(Number.isInteger(draws) && draws >= 1 && draws <= MAX_DRAWS)) {
    throw new AnalysisInputError(
      `The number of draws is ${draws}; it must be a whole number from 1 to ${MAX_DRAWS}.`,
    );
  }
  if (!Number.isSafeInteger(seed)) {
    throw new AnalysisInputError(`The seed is ${seed}; it must be a whole number.`);
  }
  const wrong = percentiles.find((p) => !(p >= 0 && p <= 100));
  if (wrong !== undefined)
    throw new AnalysisInputError(`The percentile ${wrong} does not lie within 0 to 100.`);
}

function drawn(
  { nominal, tolerancePercent, distribution = 'uniform' }: ComponentSpread,
  source: RandomSource,
): number {
  return nominal * (1 + (tolerancePercent / 100) * within(source, distribution));
}

/** From −1 to 1. */
function within(source: RandomSource, distribution: 'uniform' | 'normal'): number {
  if (distribution === 'uniform') return 2 * source.uniform() - 1;
  for (;;) {
    const x = source.normal() / 3;
    if (Math.abs(x) <= 1) return x;
  }
}

function describe(nominal: number, all: Float64Array, percentiles: readonly number[]): DrawRange {
  const sorted = all.filter((x) => !Number.isNaN(x)).sort();
  const rank = (percent: number) =>
    sorted[Math.max(1, Math.ceil((percent * sorted.length) / 100)) - 1] ?? null;
  return {
    nominal,
    ...{ min: sorted[0] ?? null, median: rank(50), max: sorted.at(-1) ?? null },
    percentiles: percentiles.map(rank),
  };
}

function wilson(count: number, draws: number): { share: number; lower: number; upper: number } {
  const share = count / draws;
  const square = Z_95 ** 2;
  const centre = (share + square / (2 * draws)) / (1 + square / draws);
  const half =
    (Z_95 / (1 + square / draws)) * Math.sqrt((share * (1 - share)) / draws + square / (4 * draws ** 2));
  return { share, lower: Math.max(0, centre - half), upper: Math.min(1, centre + half) };
}
