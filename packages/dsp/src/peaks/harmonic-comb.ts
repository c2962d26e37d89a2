/** A peak at its place on the frequency axis. */
export interface PeakPlace {
  frequencyHz: number;
  uncertaintyHz: number;
  power: number;
}

/** A fundamental and the peaks that fall on its multiples. */
export interface HarmonicComb {
  fundamentalHz: number;
  uncertaintyHz: number;
  /** Per peak its order, 0 for a peak that falls between the multiples. */
  orders: number[];
  /** Nats by which the comb shortens the description of where the peaks lie; chance alone gives less than 0. */
  evidence: number;
  /** Share of the power of all peaks. */
  share: number;
  /** Root mean square of the orders, weighted by power. */
  typicalOrder: number;
}

export interface CombRange {
  lowHz: number;
  highHz: number;
  /** Upper end of the spectrum the peaks come from. */
  bandHz: number;
}

/** Peaks whose fractions and differences are tried as fundamentals. */
const PARENTS = 12;
const LARGEST_DIVISOR = 32;
const LARGEST_DIFFERENCE_DIVISOR = 4;
/** Peaks at higher orders belong to a series by chance only. */
const LARGEST_ORDER = 100;
/** A peak this many standard deviations off a multiple does not belong to it. */
const GATE = 3;
/** A candidate starts this much less certain than its parent, which is met again among the peaks. */
const LOOSENED = 2;
/** Nats against a series without its order 1: one in 500. */
const MISSING_FUNDAMENTAL = Math.log(500);
const EULER = 0.5772;
const ROOT_TWO_PI = Math.sqrt(2 * Math.PI);

/**
 * Combs that the peaks suggest: fractions of the strong ones and differences between them, each fitted to the peaks that
 * it meets (least squares, order by order from the lowest) and judged by description length (J. Rissanen, Automatica 14,
 * 1978): a peak on a multiple is described by its order instead of its frequency, which pays only when the multiples lie
 * much wider apart than the peaks are uncertain. A dense comb that meets many peaks by chance costs more than it saves.
 *
 * @param peaks largest first; of two on the same multiple the larger one belongs to it
 */
export function harmonicCombs(peaks: readonly PeakPlace[], range: CombRange): HarmonicComb[] {
  const ascending = peaks.map((_, i) => i).sort((a, b) => peaks[a]!.frequencyHz - peaks[b]!.frequencyHz);
  return candidates(peaks)
    .map((candidate) => fitComb(peaks, ascending, candidate))
    .filter(({ frequencyHz }) => frequencyHz >= range.lowHz && frequencyHz <= range.highHz)
    .map((candidate) => judgeComb(peaks, candidate, range.bandHz));
}

interface Candidate {
  frequencyHz: number;
  uncertaintyHz: number;
}

function candidates(peaks: readonly PeakPlace[]): Candidate[] {
  const parents = peaks.slice(0, PARENTS);
  const fractions = parents.flatMap(({ frequencyHz, uncertaintyHz }) =>
    divided(frequencyHz, uncertaintyHz, LARGEST_DIVISOR),
  );
  const differences = parents.flatMap((a, i) =>
    parents.slice(i + 1).flatMap((b) => {
      const apart = Math.abs(a.frequencyHz - b.frequencyHz);
      return divided(apart, Math.hypot(a.uncertaintyHz, b.uncertaintyHz), LARGEST_DIFFERENCE_DIVISOR);
    }),
  );
  return [...fractions, ...differences];
}

function divided(frequencyHz: number, uncertaintyHz: number, largestDivisor: number): Candidate[] {
  return Array.from({ length: largestDivisor }, (_, i) => ({
    frequencyHz: frequencyHz / (i + 1),
    uncertaintyHz: uncertaintyHz / (i + 1),
  }));
}

/** Recursive least squares over the peaks in ascending order, those off the multiples passed over. */
function fitComb(peaks: readonly PeakPlace[], ascending: readonly number[], start: Candidate): Candidate {
  let { frequencyHz } = start;
  let variance = (LOOSENED * start.uncertaintyHz) ** 2;
  for (const i of ascending) {
    const peak = peaks[i]!;
    const order = Math.round(peak.frequencyHz / frequencyHz);
    const miss = peak.frequencyHz - order * frequencyHz;
    const spread = peak.uncertaintyHz ** 2 + order * order * variance;
    if (!isOrder(order) || miss * miss > GATE * GATE * spread) continue;
    frequencyHz += (order * variance * miss) / spread;
    variance *= peak.uncertaintyHz ** 2 / spread;
  }
  return { frequencyHz, uncertaintyHz: Math.sqrt(variance) };
}

function judgeComb(
  peaks: readonly PeakPlace[],
  { frequencyHz, uncertaintyHz }: Candidate,
  bandHz: number,
): HarmonicComb {
  const orderCost = Math.log(Math.log(Math.max(2, bandHz / frequencyHz)) + EULER);
  const orders: number[] = [];
  let gain = 0;
  let matched = 0;
  let onComb = 0;
  let squaredOrders = 0;
  let total = 0;
  for (const peak of peaks) {
    const order = Math.round(peak.frequencyHz / frequencyHz);
    const miss = peak.frequencyHz - order * frequencyHz;
    const spread = Math.hypot(peak.uncertaintyHz, order * uncertaintyHz);
    const saved =
      Math.log(bandHz / (ROOT_TWO_PI * spread)) - (miss / spread) ** 2 / 2 - Math.log(order) - orderCost;
    const near = isOrder(order) && Math.abs(miss) <= GATE * spread;
    const belongs = near && saved > 0 && !orders.includes(order);
    orders.push(belongs ? order : 0);
    total += peak.power;
    if (!belongs) continue;
    gain += saved;
    matched++;
    onComb += peak.power;
    squaredOrders += order * order * peak.power;
  }
  const ownCost = Math.log(bandHz / (ROOT_TWO_PI * uncertaintyHz));
  const missingCost = orders.includes(1) ? 0 : MISSING_FUNDAMENTAL;
  const evidence = gain - ownCost - membershipCost(matched, peaks.length) - missingCost;
  return {
    fundamentalHz: frequencyHz,
    uncertaintyHz,
    orders,
    evidence,
    share: onComb / total,
    typicalOrder: onComb > 0 ? Math.sqrt(squaredOrders / onComb) : 0,
  };
}

function isOrder(order: number): boolean {
  return order >= 1 && order <= LARGEST_ORDER;
}

/** n H(k/n): what it takes to say which k of n peaks belong to the comb. */
function membershipCost(matched: number, count: number): number {
  const share = matched / count;
  const part = (p: number) => (p > 0 ? -p * Math.log(p) : 0);
  return count * (part(share) + part(1 - share));
}
