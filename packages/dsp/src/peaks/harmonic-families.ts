import { harmonicCombs, type CombRange, type HarmonicComb, type PeakPlace } from './harmonic-comb.js';

/**
 * Takes peaks apart into harmonic series, the one with the best evidence first, each among the peaks that the earlier ones
 * left over. Peaks that belong to no series remain.
 *
 * @param leastEvidence nats by which a series must shorten the description of its peaks; e^leastEvidence is about the odds
 *   against its being there by chance
 * @returns combs with their orders per peak of the whole list; shares are of the power of the whole list
 */
export function harmonicFamilies(
  peaks: readonly PeakPlace[],
  range: CombRange,
  { leastEvidence, most }: { leastEvidence: number; most: number },
): HarmonicComb[] {
  const total = peaks.reduce((sum, peak) => sum + peak.power, 0);
  const families: HarmonicComb[] = [];
  let left = peaks.map((_, i) => i);
  while (families.length < most && left.length > 1) {
    const rest = left.map((i) => peaks[i]!);
    const best = bestEvidence(harmonicCombs(rest, range));
    if (!best || best.evidence < leastEvidence) break;
    const orders = peaks.map((_, i) => best.orders[left.indexOf(i)] ?? 0);
    const power = peaks.reduce((sum, peak, i) => (orders[i]! > 0 ? sum + peak.power : sum), 0);
    families.push({ ...best, orders, share: power / total });
    left = left.filter((i) => orders[i] === 0);
  }
  return families;
}

function bestEvidence(combs: readonly HarmonicComb[]): HarmonicComb | null {
  return combs.reduce<HarmonicComb | null>(
    (best, comb) => (comb.evidence > (best?.evidence ?? -Infinity) ? comb : best),
    null,
  );
}
