import type {
  ChannelAnalysis,
  Harmonic,
  LimitSet,
  OrderVerdict,
  VerdictParameters,
} from '@overtally/contracts';
import { evaluate, measurementOfChannel, type Evaluation } from '@overtally/limits';
import { joined, parameterWords } from './words.js';

/** One order with what a limit set says of it. */
export interface OrderRow extends Harmonic {
  /** Value compared with limits: the smoothed group of a current, the subgroup of anything else, else the line. */
  compared: number;
  limit: number | null;
  sharePercent: number | null;
  result: OrderVerdict['result'] | null;
}

/** A channel beside a limit set; a comparison, not a verdict. */
export interface ChannelComparison {
  rows: OrderRow[];
  words: string;
  tone: 'over' | 'near' | 'within' | undefined;
  /** Why some or all of it could not be compared; null when all was. */
  gap: string | null;
}

/** Puts a channel beside `set` with simple acceptance; without a set the orders stand alone. */
export function compareChannel(
  channel: ChannelAnalysis,
  set: LimitSet | null,
  parameters: VerdictParameters = {},
): ChannelComparison {
  const measurement = measurementOfChannel(channel);
  const evaluation = set && evaluate(set, measurement, { parameters, decisionRule: 'simple-acceptance' });
  const judged = new Map(evaluation?.orders.map((entry) => [entry.order, entry]));
  const values = new Map(measurement.harmonics.map(({ order, mean }) => [order, mean]));
  const rows = channel.harmonics.map((harmonic) => {
    const entry = harmonic.order > 1 ? judged.get(harmonic.order) : undefined;
    return {
      ...harmonic,
      compared: harmonic.order === 1 ? harmonic.rms : (values.get(harmonic.order) ?? harmonic.rms),
      limit: entry?.limit ?? null,
      sharePercent: entry?.sharePercent ?? null,
      result: entry?.result ?? null,
    };
  });
  return { rows, ...conclusion(set, evaluation, parameters) };
}

function conclusion(
  set: LimitSet | null,
  evaluation: Evaluation | null,
  parameters: VerdictParameters,
): Omit<ChannelComparison, 'rows'> {
  if (!set || !evaluation) return { words: 'not compared', tone: undefined, gap: null };
  const missing = set.parameters.filter((name) => parameters[name] === undefined);
  if (missing.length > 0 && evaluation.result === 'not-decidable') {
    const needs = `needs ${joined(missing.map((name) => parameterWords[name]))}`;
    return { words: needs, tone: 'near', gap: `This set ${needs}. Judge the channel to give it.` };
  }
  switch (evaluation.result) {
    case 'fail':
    case 'conditional-fail':
      return { words: overWords(evaluation), tone: 'over', gap: null };
    case 'pass':
    case 'conditional-pass':
      return { words: 'within', tone: 'within', gap: null };
    case 'not-applicable':
      return { words: 'does not apply', tone: undefined, gap: evaluation.reason };
    case 'not-decidable':
      return { words: 'not decidable', tone: 'near', gap: evaluation.reason };
  }
}

function overWords({ orders, totals }: Evaluation): string {
  const over = orders.filter((entry) => entry.result === 'fail' || entry.result === 'conditional-fail');
  const names = totals.filter((entry) => entry.result === 'fail').map((entry) => entry.name);
  const parts = [];
  if (over.length > 0 && over.length <= 3) parts.push(`at ${joined(over.map(({ order }) => String(order)))}`);
  if (over.length > 3) parts.push(`at ${over.length} orders`);
  if (names.length > 0) parts.push(`in ${joined(names)}`);
  return `over ${parts.join(' and ')}`;
}

export const isOver = ({ result }: Pick<OrderRow, 'result'>): boolean =>
  result === 'fail' || result === 'conditional-fail';

export const resultWords: Record<OrderVerdict['result'], string> = {
  pass: 'within',
  fail: 'over',
  'conditional-pass': 'within, uncertain',
  'conditional-fail': 'over, uncertain',
  'not-applicable': 'no limit',
  'not-decidable': 'not decidable',
  disregarded: 'disregarded',
};
