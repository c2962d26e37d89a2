import {
  verdictParametersSchema,
  type ChannelAnalysis,
  type DecisionRule,
  type LimitSet,
  type Repeat,
  type VerdictParameters,
} from '@overtally/contracts';
import { neededParameters, optionalParameters } from '@overtally/limits';
import type { ParameterKey } from '../../components/verdict/verdict-words.js';

/** What the form for a verdict holds; parameters as they were typed. */
export interface JudgeDraft {
  channel: number;
  limitSetId: string;
  decisionRule: DecisionRule;
  entries: Partial<Record<ParameterKey, string>>;
  /** Channels of other analyses that are repeats of the test. */
  repeats: Repeat[];
}

/** Parameters that a verdict is asked for; optional ones are checked when given. */
export interface AskedParameters {
  needed: ParameterKey[];
  optional: ParameterKey[];
}

/**
 * Parameters that the set and the rule ask for, in the order they are asked. The uncertainty is asked for by the
 * rules that guard with it; it may be left out where the orders of the channel carry their own.
 */
export function askedParameters(
  set: LimitSet,
  rule: DecisionRule,
  channel?: Pick<ChannelAnalysis, 'harmonics'>,
): AskedParameters {
  const needed: ParameterKey[] = neededParameters(set);
  const optional: ParameterKey[] = optionalParameters(set);
  const hasOwn = channel?.harmonics.some(({ uncertainty }) => uncertainty !== null) ?? false;
  if (rule !== 'simple-acceptance') (hasOwn ? optional : needed).push('expandedUncertaintyPercent');
  return { needed, optional };
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
  { needed, optional }: AskedParameters,
  entries: Partial<Record<ParameterKey, string>>,
): ReadParameters {
  const read: ReadParameters = { parameters: {}, problems: {}, missing: [] };
  for (const key of [...needed, ...optional]) {
    const text = (entries[key] ?? '').trim();
    if (text === '') {
      if (needed.includes(key)) read.missing.push(key);
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

/** Sets for the quantity of the channel first, the others after; each part keeps its order, without retired sets. */
export function setsForChannel(
  sets: readonly LimitSet[],
  channel: Pick<ChannelAnalysis, 'quantity'> | undefined,
): { fitting: LimitSet[]; others: LimitSet[] } {
  const offered = sets.filter(({ retiredAt }) => retiredAt === undefined);
  const fits = (set: LimitSet) => set.quantity === channel?.quantity;
  return { fitting: offered.filter(fits), others: offered.filter((set) => !fits(set)) };
}
