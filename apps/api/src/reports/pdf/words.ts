import type {
  OrderVerdict,
  Report,
  ReportContent,
  Settings,
  Verdict,
  VerdictResult,
} from '@overtally/contracts';
import { formatList } from './format.js';
import { colours } from './theme.js';

const resultNames: Record<VerdictResult, string> = {
  pass: 'Pass',
  fail: 'Fail',
  'conditional-pass': 'Conditional pass',
  'conditional-fail': 'Conditional fail',
  'not-applicable': 'Not applicable',
  'not-decidable': 'Not decidable',
};

const orderNames: Record<OrderVerdict['result'], string> = {
  pass: 'within',
  fail: 'over',
  'conditional-pass': 'within, guarded',
  'conditional-fail': 'over, guarded',
  'not-applicable': 'not applicable',
  'not-decidable': 'not decidable',
  disregarded: 'disregarded',
};

const statusNames: Record<Report['status'], string> = {
  draft: 'Draft',
  'in-review': 'In review',
  issued: 'Issued',
  superseded: 'Superseded',
};

const profileNames: Record<Settings['profile'], string> = {
  mains: 'mains, synchronous windows',
  tone: 'single tone',
  general: 'general, averaged windows',
};

const confidenceNames = { high: 'high', medium: 'medium', low: 'low' } as const;

/** A verdict's result as a heading says it. */
export const resultName = (result: VerdictResult): string => resultNames[result];

/** The result of one order or total in the language of a bench: within or over. */
export const orderResultName = (result: OrderVerdict['result']): string => orderNames[result];

export const statusName = (status: Report['status']): string => statusNames[status];
export const profileName = (profile: Settings['profile']): string => profileNames[profile];
export const confidenceName = (confidence: keyof typeof confidenceNames): string =>
  confidenceNames[confidence];

/** True for a result that stands over the limit, guarded or not. */
export const isOver = (result: OrderVerdict['result']): boolean =>
  result === 'fail' || result === 'conditional-fail';

/** Vermilion for over, green-grey for within, amber for what is left open. */
export function resultColour(result: OrderVerdict['result']): string {
  if (isOver(result)) return colours.over;
  if (result === 'pass') return colours.within;
  return result === 'disregarded' || result === 'not-applicable' ? colours.inkSoft : colours.near;
}

/** One verdict in a few words: "over at 15, 19, 21 and 9 more", "within", "THD over". */
export function verdictInShort(verdict: Pick<Verdict, 'result' | 'orders' | 'totals'>): string {
  const orders = verdict.orders.filter((entry) => isOver(entry.result)).map((entry) => entry.order);
  const totals = verdict.totals.filter((entry) => isOver(entry.result)).map((entry) => entry.name);
  if (orders.length > 0) {
    return `over at ${formatList(orders, 3)}${totals.length > 0 ? `; ${formatList(totals)} over` : ''}`;
  }
  if (totals.length > 0) return `${formatList(totals)} over`;
  return verdict.result === 'pass' ? 'within' : resultName(verdict.result).toLowerCase();
}

const recordingsCount = (count: number): string => `${count} recording${count === 1 ? '' : 's'}`;

const groupPhrases: [VerdictResult, string][] = [
  ['fail', 'over a limit'],
  ['conditional-fail', 'over a limit within the measurement uncertainty'],
  ['not-decidable', 'not decidable'],
  ['conditional-pass', 'within the limits by less than the measurement uncertainty'],
  ['pass', 'within the limits'],
  ['not-applicable', 'outside the scope of the limit set'],
];

/** The overall result as one sentence: "2 of 3 judged channels are over a limit, 1 within the limits." */
export function overallSentence(content: ReportContent): string {
  const [only, ...others] = content.sections;
  if (only && others.length === 0) {
    return `${only.recording.number} ${only.recording.name}, ${only.verdict.channelName}: ${verdictInShort(only.verdict)}.`;
  }
  const results = content.sections.map((section) => section.verdict.result);
  const first = `${results.length} verdict${results.length === 1 ? '' : 's'} on ${recordingsCount(
    new Set(content.sections.map((section) => section.recording.id)).size,
  )}`;
  const parts = groupPhrases
    .map(([result, phrase]) => ({ phrase, count: results.filter((each) => each === result).length }))
    .filter((part) => part.count > 0)
    .map((part) => `${part.count} ${part.phrase}`);
  return `${first}: ${formatList(parts)}.`;
}

/** Said where a report must state something and nothing is known. */
export const notStated = 'not stated';

/** Text as given, or what is said when there is none. */
export const stated = (given: string, otherwise: string = notStated): string => given.trim() || otherwise;

export const laboratoryName = ({ laboratory }: Pick<ReportContent, 'laboratory'>): string =>
  stated(laboratory.name, 'Laboratory not stated');
