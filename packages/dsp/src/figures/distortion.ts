/**
 * THD_F = √(Σ_{h=2..maxOrder} X_h²)/X_1 as a plain ratio (IEC 61000-4-7, 3.2.5 for single lines).
 *
 * @param harmonicRms X_1, X_2, … in this order; missing high orders count as absent
 * @returns null when there is no fundamental to relate to
 */
export function thdF(harmonicRms: ArrayLike<number>, maxOrder: number): number | null {
  const fundamental = harmonicRms.length > 0 ? harmonicRms[0]! : 0;
  return fundamental > 0 ? Math.sqrt(distortionPower(harmonicRms, maxOrder)) / fundamental : null;
}

/**
 * THD_R = √(Σ_{h=2..maxOrder} X_h²)/√(Σ_{h=1..maxOrder} X_h²) as a plain ratio: no DC, no interharmonics and no noise
 * in the denominator.
 *
 * @returns null when all orders are zero
 */
export function thdR(harmonicRms: ArrayLike<number>, maxOrder: number): number | null {
  const distortion = distortionPower(harmonicRms, maxOrder);
  const total = distortion + (harmonicRms.length > 0 ? harmonicRms[0]! ** 2 : 0);
  return total > 0 ? Math.sqrt(distortion / total) : null;
}

function distortionPower(harmonicRms: ArrayLike<number>, maxOrder: number): number {
  let sum = 0;
  for (let i = 1; i < Math.min(maxOrder, harmonicRms.length); i++) sum += harmonicRms[i]! ** 2;
  return sum;
}
