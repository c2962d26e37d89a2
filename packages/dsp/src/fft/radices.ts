/** Odd radices up to here run as a pass of their own; a length with a larger prime factor needs the chirp transform. */
const LARGEST_RADIX = 97;

/**
 * Radices of the passes of a transform, in their order: fours, a two, then odd primes. The first one is even when the
 * length is.
 *
 * @returns null when a prime factor is too large for a pass
 */
export function radicesOf(length: number): number[] | null {
  const radices: number[] = [];
  let rest = length;
  for (; rest % 4 === 0; rest /= 4) radices.push(4);
  for (; rest % 2 === 0; rest /= 2) radices.push(2);
  for (let prime = 3; prime <= LARGEST_RADIX && rest > 1; prime += 2) {
    for (; rest % prime === 0; rest /= prime) radices.push(prime);
  }
  return rest === 1 ? radices : null;
}

/** Relative time of a pass per sample; measured. */
const PASS_COST: Record<number, number> = { 2: 0.7, 3: 1, 4: 1, 5: 1.5 };

/**
 * The length at or above `minimum`, a multiple of 4 with no prime factor above 5, whose transform should take least time.
 */
export function convenientLength(minimum: number): number {
  let best = 2 ** Math.ceil(Math.log2(Math.max(16, minimum)));
  let bestCost = costOf(best);
  for (let threes = 1; 4 * threes < best; threes *= 3) {
    for (let odd = threes; 4 * odd < best; odd *= 5) {
      const length = odd * Math.max(4, 2 ** Math.ceil(Math.log2(minimum / odd)));
      const cost = costOf(length);
      if (cost < bestCost) {
        best = length;
        bestCost = cost;
      }
    }
  }
  return best;
}

function costOf(length: number): number {
  return radicesOf(length)!.reduce((sum, radix) => sum + PASS_COST[radix]!, 0) * length;
}
