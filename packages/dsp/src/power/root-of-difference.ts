/** Digits lost in the squares and in total rms values that were printed and read again. */
const ROUNDING = 1e-10;

/**
 * √(a² − b²) of power quantities; 0 where rounding alone makes the difference negative.
 *
 * @param scale the quantity whose rounding enters a² and b², such as S
 * @returns null when b exceeds a beyond rounding: the two do not belong together
 */
export function rootOfDifference(a: number, b: number, scale: number): number | null {
  const difference = (a - b) * (a + b);
  if (difference >= 0) return Math.sqrt(difference);
  return difference >= -ROUNDING * scale * scale ? 0 : null;
}

/** a/b, null when b is zero. */
export function ratio(a: number | null, b: number): number | null {
  return a === null || b === 0 ? null : a / b;
}
