const FIRST_ORDER = 14;
const LAST_ORDER = 40;

/**
 * Partial weighted harmonic distortion √(Σ_{h=14..40} h (Y_h/Y_1)²) as a plain ratio (IEC 61000-4-7, 3.3.4; orders of IEC
 * 61000-3-12).
 *
 * @param rms Y_1, Y_2, … in this order
 * @returns null without a fundamental, or when the orders do not reach 40
 */
export function weightedDistortion(rms: ArrayLike<number>): number | null {
  const fundamental = rms[0] ?? 0;
  if (!(fundamental > 0) || rms.length < LAST_ORDER) return null;
  let sum = 0;
  for (let h = FIRST_ORDER; h <= LAST_ORDER; h++) sum += h * (rms[h - 1]! / fundamental) ** 2;
  return Math.sqrt(sum);
}
