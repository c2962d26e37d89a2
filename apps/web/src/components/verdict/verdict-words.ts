import type { DecisionRule, OrderVerdict, VerdictParameters, VerdictResult } from '@overtally/contracts';

export type VerdictTone = 'over' | 'near' | 'within' | undefined;

/** Result of a verdict as a whole (ILAC-G8:09/2019 for the conditional ones). */
export const verdictWords: Record<VerdictResult, string> = {
  pass: 'Pass',
  fail: 'Fail',
  'conditional-pass': 'Conditional pass',
  'conditional-fail': 'Conditional fail',
  'not-applicable': 'Not applicable',
  'not-decidable': 'Not decidable',
};

/** Result of one order or total. */
export const partWords: Record<OrderVerdict['result'], string> = {
  pass: 'within',
  fail: 'over',
  'conditional-pass': 'within, uncertain',
  'conditional-fail': 'over, uncertain',
  'not-applicable': 'not applied',
  'not-decidable': 'not decidable',
  disregarded: 'too small to count',
};

const tones: Record<OrderVerdict['result'], VerdictTone> = {
  pass: 'within',
  fail: 'over',
  'conditional-pass': 'near',
  'conditional-fail': 'over',
  'not-applicable': undefined,
  'not-decidable': 'near',
  disregarded: undefined,
};

/** Colour that goes with a result; the words say it too. */
export const verdictTone = (result: OrderVerdict['result']): VerdictTone => tones[result];

export const decisionRuleNames: Record<DecisionRule, string> = {
  'simple-acceptance': 'Simple acceptance',
  'guarded-acceptance': 'Guarded acceptance',
  'non-binary': 'Non-binary statement',
};

export type ParameterKey = keyof VerdictParameters;

interface ParameterWords {
  label: string;
  unit: string;
  help: string;
}

/** Values that a verdict may need beside the measurement, as they are asked for and shown. */
export const parameterWords: Record<ParameterKey, ParameterWords> = {
  powerW: { label: 'Active power', unit: 'W', help: 'Measured or declared input power' },
  powerFactor: { label: 'Power factor', unit: '', help: 'Between 0 and 1' },
  iscOverIl: { label: 'Short-circuit ratio Isc/IL', unit: '', help: 'At the point of common coupling' },
  ilA: { label: 'Demand current IL', unit: 'A', help: 'Highest demand load current, fundamental' },
  rsce: { label: 'Short-circuit ratio Rsce', unit: '', help: 'Of the supply at the equipment' },
  irefA: { label: 'Reference current Iref', unit: 'A', help: 'That the percentages refer to' },
  nominalV: { label: 'Nominal voltage', unit: 'V', help: 'Of the supply' },
  expandedUncertaintyPercent: {
    label: 'Expanded uncertainty U (k = 2)',
    unit: '%',
    help: 'Of an order, in percent of its value',
  },
};
