/** An expected quantity, in the form that fixtures/reference/SOURCE.md describes. */
export interface Expected {
  kind: string;
  value?: unknown;
  values?: unknown[];
  tol_abs?: number;
  tol_rel?: number;
  tol_abs_each?: number[];
  must?: (string | string[])[];
  must_not?: string[];
  groups?: string[][];
  need?: string;
  when?: Record<string, string>;
}

/** Whether a quantity is as expected. */
export function isMet(expected: Expected, got: unknown): boolean {
  const { kind, value } = expected;
  switch (kind) {
    case 'number':
    case 'angle':
      return isNear(expected, value, got, expected.tol_abs);
    case 'array':
    case 'angles':
      return areNear(expected, value as unknown[], got);
    case 'one_of':
      return expected.values!.includes(got);
    case 'poles':
      return haveAllPoles(expected, got as number[][]);
    case 'flags':
      return (
        (expected.must ?? []).every((name) => [name].flat().some((one) => (got as string[]).includes(one))) &&
        !(expected.must_not ?? []).some((name) => (got as string[]).includes(name))
      );
    case 'mention':
      return expected.groups!.every((words) =>
        words.some((word) => String(got).toLowerCase().includes(word.toLowerCase())),
      );
    default:
      return got === value;
  }
}

function isNear({ kind, tol_rel = 0 }: Expected, want: unknown, got: unknown, tolAbs = 0): boolean {
  if (want === null) return true;
  if (Array.isArray(want)) return areNear({ kind, tol_rel, tol_abs: tolAbs }, want, got);
  if (typeof got !== 'number' || typeof want !== 'number') return false;
  const turns = kind.startsWith('angle') ? Math.round((got - want) / 360) : 0;
  return Math.abs(got - want - 360 * turns) <= Math.max(tolAbs, tol_rel * Math.abs(want));
}

function areNear(expected: Expected, want: unknown[], got: unknown): boolean {
  if (!Array.isArray(got) || got.length !== want.length) return false;
  return want.every((one, i) =>
    isNear(expected, one, got[i], expected.tol_abs_each?.[i] ?? expected.tol_abs),
  );
}

/** Every expected pole has one of its own within the tolerance, in any order. */
function haveAllPoles({ value, tol_abs = 0, tol_rel = 0 }: Expected, got: number[][]): boolean {
  const left = [...got];
  const distance = (a: number[], b: number[]) => Math.hypot(a[0]! - b[0]!, a[1]! - b[1]!);
  const found = (value as number[][]).every((pole) => {
    const near = left.sort((a, b) => distance(a, pole) - distance(b, pole)).shift();
    return near !== undefined && distance(near, pole) <= Math.max(tol_abs, tol_rel * Math.hypot(...pole));
  });
  return found && left.length === 0;
}
