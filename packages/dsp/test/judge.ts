import type { ComplexPair, Expected, Nested } from './reference-cases.js';

/** What is wrong with a result, or null: the comparison that fixtures/reference/SOURCE.md describes. */
export function judge(expected: Expected, got: unknown): string | null {
  switch (expected.kind) {
    case 'number':
      return judgeNumber(expected, expected.value as number, got, false);
    case 'angle':
      return judgeNumber(expected, expected.value as number, got, true);
    case 'array':
      return judgeArray(expected, got, false);
    case 'angles':
      return judgeArray(expected, got, true);
    case 'integer':
    case 'bool':
      return got === expected.value ? null : `expected ${String(expected.value)}, got ${String(got)}`;
    case 'text':
      return String(got).toLowerCase() === String(expected.value).toLowerCase()
        ? null
        : `expected ${String(expected.value)}, got ${String(got)}`;
    case 'one_of':
      return expected.values!.includes(got)
        ? null
        : `expected one of ${expected.values!.join()}, got ${String(got)}`;
    case 'poles':
      return judgePoles(expected, got as ComplexPair[]);
    case 'flags':
      return judgeFlags(expected, got as string[]);
    case 'mention':
      return judgeMention(expected, String(got));
  }
}

function judgeNumber(expected: Expected, want: number, got: unknown, angle: boolean): string | null {
  if (typeof got !== 'number' || !Number.isFinite(got)) return `expected about ${want}, got ${String(got)}`;
  const difference = angle ? ((((got - want + 180) % 360) + 360) % 360) - 180 : got - want;
  const limit = Math.max(expected.tol_abs ?? 0, (expected.tol_rel ?? 0) * Math.abs(want));
  return Math.abs(difference) <= limit ? null : `expected ${want} ± ${limit}, got ${got}`;
}

function judgeArray(expected: Expected, got: unknown, angle: boolean): string | null {
  const want = expected.value as Nested;
  if (!Array.isArray(got) || got.length !== want.length) {
    return `expected ${want.length} elements, got ${Array.isArray(got) ? got.length : String(got)}`;
  }
  const misses = want.flatMap((value, i) => {
    if (value === null) return [];
    const each = expected.tol_abs_each?.[i];
    const miss = judgeNumber(
      each === undefined ? expected : { ...expected, tol_abs: each },
      value,
      got[i],
      angle,
    );
    return miss === null ? [] : [`[${i}] ${miss}`];
  });
  return misses.length === 0 ? null : misses.join('; ');
}

/** Every expected root has a partner of its own within the tolerance, in any order. */
function judgePoles(expected: Expected, got: ComplexPair[]): string | null {
  const want = expected.value as ComplexPair[];
  const left = [...got];
  for (const [re, im] of want) {
    const distance = ([a, b]: ComplexPair): number => Math.hypot(a - re, b - im);
    const nearest = left.reduce(
      (best, root, i) => (best < 0 || distance(root) < distance(left[best]!) ? i : best),
      -1,
    );
    const limit = Math.max(expected.tol_abs ?? 0, (expected.tol_rel ?? 0) * Math.hypot(re, im));
    if (nearest < 0 || !(distance(left[nearest]!) <= limit)) {
      return `no root within ${limit} of ${re}, ${im} among ${left.join('; ')}`;
    }
    left.splice(nearest, 1);
  }
  return left.length === 0 ? null : `roots too many: ${left.join('; ')}`;
}

function judgeFlags(expected: Expected, got: string[]): string | null {
  const missing = (expected.must ?? []).filter((m) => ![m].flat().some((name) => got.includes(name)));
  const wrong = (expected.must_not ?? []).filter((name) => got.includes(name));
  return missing.length + wrong.length === 0
    ? null
    : `missing ${missing.join()}, wrong ${wrong.join()}, got ${got.join()}`;
}

function judgeMention(expected: Expected, got: string): string | null {
  const text = got.toLowerCase();
  const missing = expected.groups!.filter(
    (words) => !words.some((word) => text.includes(word.toLowerCase())),
  );
  return missing.length === 0 ? null : `no word of ${missing.join(' / ')} in "${got}"`;
}
