import {
  verdictParametersSchema,
  type ChannelAnalysis,
  type DecisionRule,
  type LimitSet,
  type VerdictParameters,
} from '@overtally/contracts';
import type { ParameterKey } from '../../components/verdict/verdict-words.js';

/** What the form for a verdict holds; parameters as they were typed. */
export interface JudgeDraft {
  channel: number;
  limitSetId: string;
  decisionRule: DecisionRule;
  entries: Partial<Record<ParameterKey, string>>;
}

/** Parameters that the set and the rule ask for, in the order they are asked. */
export function neededParameters(set: LimitSet, rule: DecisionRule): ParameterKey[] {
  const reference = set.referenceParameter === null ? [] : [set.referenceParameter];
  const uncertainty = rule === 'simple-acceptance' ? [] : (['expandedUncertaintyPercent'] as const);
  return [...new Set<ParameterKey>([...set.parameters, ...reference, ...uncertainty])];
}

export interface ReadParameters {
  /** Entries that are valid numbers. */
  parameters: VerdictParameters;
  /** What is wrong with an entry that is not empty. */
  problems: Partial<Record<ParameterKey, string>>;
  missing: ParameterKey[];
}

/** Reads the entries that are asked for; a decimal comma counts as a point. */
export function readParameters(
  needed: readonly ParameterKey[],
  entries: Partial<Record<ParameterKey, string>>,
): ReadParameters {
  const read: ReadParameters = { parameters: {}, problems: {}, missing: [] };
  for (const key of needed) {
    const text = (entries[key] ?? '').trim();
    if (text === '') {
      read.missing.push(key);
      continue;
    }
    const value = Number(text.replace(',', '.'));
    const problem = Number.isFinite(value) ? problemOf(key, value) : 'Give a number, such as 230 or 0.95';
    if (problem === null) read.parameters[key] = value;
    else read.problems[key] = problem;
  }
  return read;
}

function problemOf(key: ParameterKey, value: number): string | null {
  if (verdictParametersSchema.safeParse({ [key]: value }).success) return null;
  if (key === 'powerFactor') return 'Between 0 and 1';
  return key === 'expandedUncertaintyPercent' ? 'Between 0 % and 100 %' : 'Must be above zero';
}

/** Sets for the quantity of the channel first, the others after; each part keeps its order. */
export function setsForChannel(
  sets: readonly LimitSet[],
  channel: Pick<ChannelAnalysis, 'quantity'> | undefined,
): { fitting: LimitSet[]; others: LimitSet[] } {
  const fits = (set: LimitSet) => set.quantity === channel?.quantity;
  return { fitting: sets.filter(fits), others: sets.filter((set) => !fits(set)) };
}
