import { fitsPattern, literalLength, type ImportOptions } from '@overtally/contracts';

/** What decides which rule is tried first. */
export interface RankedRule {
  id: string;
  fileNamePattern: string;
  columnNames: string[] | null;
  createdAt: Date;
}

/** Rules in the order they are tried: those that name columns first, then by length of pattern, then the newer. */
export function inOrder<Rule extends RankedRule>(rules: readonly Rule[]): Rule[] {
  return [...rules].sort(
    (one, other) =>
      Number(other.columnNames !== null) - Number(one.columnNames !== null) ||
      literalLength(other.fileNamePattern) - literalLength(one.fileNamePattern) ||
      other.createdAt.getTime() - one.createdAt.getTime() ||
      (one.id < other.id ? -1 : 1),
  );
}

/** Names of a file's columns when it is read under given options. */
export type ColumnsUnder = (options: ImportOptions) => Promise<readonly string[]>;

/** The first rule in order that fits a file by its name and, where the rule names columns, by their names in order. */
export async function fittingRule<Rule extends RankedRule & { options: ImportOptions }>(
  rules: readonly Rule[],
  fileName: string,
  columnsUnder: ColumnsUnder,
): Promise<Rule | undefined> {
  for (const rule of inOrder(rules)) {
    if (!fitsPattern(rule.fileNamePattern, fileName)) continue;
    if (rule.columnNames === null || areSame(rule.columnNames, await columnsUnder(rule.options))) return rule;
  }
  return undefined;
}

function areSame(wanted: readonly string[], found: readonly string[]): boolean {
  return wanted.length === found.length && wanted.every((name, i) => name === found[i]);
}
