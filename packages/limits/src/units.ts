const prefixes: Readonly<Record<string, number>> = {
  p: 1e-12,
  n: 1e-9,
  u: 1e-6,
  µ: 1e-6,
  μ: 1e-6,
  m: 1e-3,
  k: 1e3,
  M: 1e6,
  G: 1e9,
};
const prefixable = new Set(['A', 'V', 'W', 'Pa']);

function split(unit: string): { factor: number; base: string } {
  const factor = prefixes[unit.charAt(0)];
  const base = unit.slice(1);
  return factor !== undefined && prefixable.has(base) ? { factor, base } : { factor: 1, base: unit };
}

/**
 * How many `to` make one `from`: `unitRatio('A', 'mA')` is 1000. SI prefixes of A, V, W and Pa are known;
 * null when the two units do not measure the same thing.
 */
export function unitRatio(from: string, to: string): number | null {
  if (from === to) return 1;
  const source = split(from);
  const target = split(to);
  return source.base === target.base ? source.factor / target.factor : null;
}
