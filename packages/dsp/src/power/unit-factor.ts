const PREFIXES: Record<string, number> = {
  '': 1,
  G: 1e9,
  M: 1e6,
  k: 1e3,
  m: 1e-3,
  u: 1e-6,
  µ: 1e-6,
  μ: 1e-6,
  n: 1e-9,
  p: 1e-12,
};

/**
 * Factor from a unit to its base unit V or A: 1000 for kV. A blank unit counts as the base unit.
 *
 * @returns null for a unit of anything else
 */
export function unitFactor(unit: string, base: 'V' | 'A'): number | null {
  const written = unit.trim();
  if (written === '') return 1;
  const prefix = written.endsWith(base) ? written.slice(0, -1) : null;
  return prefix !== null && Object.hasOwn(PREFIXES, prefix) ? PREFIXES[prefix]! : null;
}
