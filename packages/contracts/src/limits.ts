import { z } from 'zod';
import { idSchema, maxChannelIndex, pageOf, personRefSchema, timestampSchema } from './common.js';
import { quantitySchema } from './recordings.js';

export const confidenceSchema = z.enum(['high', 'medium', 'low']);

/** What a limit value refers to. */
export const limitBasisSchema = z.enum([
  'absolute',
  'percent-of-fundamental',
  'percent-of-reference',
  'milliampere-per-watt',
]);
export type LimitBasis = z.infer<typeof limitBasisSchema>;

/** Values a verdict may need beside the measurement. */
export const verdictParametersSchema = z.strictObject({
  powerW: z.number().positive().optional().describe('Active input power in W, measured or declared'),
  powerFactor: z.number().min(0).max(1).optional(),
  iscOverIl: z.number().positive().optional(),
  ilA: z.number().positive().optional(),
  rsce: z.number().positive().optional(),
  irefA: z.number().positive().optional(),
  nominalV: z.number().positive().optional(),
  expandedUncertaintyPercent: z
    .number()
    .min(0)
    .max(100)
    .optional()
    .describe('Expanded uncertainty (k = 2) of an order, in percent of its value'),
});
export type VerdictParameters = z.infer<typeof verdictParametersSchema>;
export const parameterNameSchema = z.enum([
  'powerW',
  'powerFactor',
  'iscOverIl',
  'ilA',
  'rsce',
  'irefA',
  'nominalV',
]);
export type ParameterName = z.infer<typeof parameterNameSchema>;

export const limitEntrySchema = z.object({
  order: z.number().int().min(2).max(200),
  limit: z.number().positive(),
  capA: z.number().positive().optional().describe('Upper bound in A, with milliampere-per-watt'),
  timesParameter: parameterNameSchema
    .optional()
    .describe('The limit is multiplied by this parameter, as 30 times the power factor'),
  basis: limitBasisSchema.optional().describe("Where it differs from the set's"),
  unit: z.string().max(20).optional().describe("Unit of an absolute limit, where it differs from the set's"),
  referenceParameter: parameterNameSchema.optional().describe("Where it differs from the set's"),
  formula: z.string().max(120).optional().describe('What the value was worked out from, for display'),
});
export type LimitEntry = z.infer<typeof limitEntrySchema>;

/** Limit on a total, such as THD. */
export const totalLimitSchema = z.object({
  name: z.enum(['THD', 'THC', 'POHC', 'PWHC', 'TDD']),
  limit: z.number().positive(),
  maxOrder: z.number().int().min(2).max(200),
  basis: limitBasisSchema.optional().describe('Where the total refers to something else than its name says'),
});
export type TotalLimit = z.infer<typeof totalLimitSchema>;

/** How single smoothed values and small currents are treated. */
export const limitProcedureSchema = z.enum(['iec61000-3-2', 'iec61000-3-12', 'plain']);

/** Values of one parameter, each end open or closed: above < value, from <= value, value < below, value <= upTo. */
export const parameterRangeSchema = z.object({
  parameter: parameterNameSchema,
  above: z.number().optional(),
  from: z.number().optional(),
  below: z.number().optional(),
  upTo: z.number().optional(),
});
export type ParameterRange = z.infer<typeof parameterRangeSchema>;

/** What the shape of the current must be, in degrees after the zero crossing of the fundamental voltage. */
export const waveformConditionSchema = z.object({
  startsByDeg: z.number(),
  peakByDeg: z.number(),
  endsNotBeforeDeg: z.number(),
  how: z.string().describe('How the angles are read'),
});
export type WaveformCondition = z.infer<typeof waveformConditionSchema>;

/** Limits of a set that hold for a range of a parameter, or as one of several alternatives. */
export const limitRowSchema = z.object({
  label: z.string().max(160),
  selector: parameterRangeSchema.optional(),
  basis: limitBasisSchema.optional().describe("Where it differs from the set's"),
  unit: z.string().max(20).optional(),
  orders: z.array(limitEntrySchema).max(199),
  totals: z.array(totalLimitSchema).max(5),
  waveform: waveformConditionSchema.optional(),
});
export type LimitRow = z.infer<typeof limitRowSchema>;

/**
 * How one row is taken: by the range that holds the parameter, by linear interpolation between the lower ends of
 * the ranges, or as alternatives of which one is enough.
 */
export const rowChoiceSchema = z.enum(['range', 'interpolate', 'alternative']);
export type RowChoice = z.infer<typeof rowChoiceSchema>;

/** Where a set applies; outside, the verdict is `not-applicable` with the reason. */
export const applicabilitySchema = parameterRangeSchema.extend({
  otherwise: z.string().max(300).describe('The reason when the parameter is outside, as a sentence'),
});
export type Applicability = z.infer<typeof applicabilitySchema>;

const conditionsOfUse = {
  rows: z
    .array(limitRowSchema)
    .max(20)
    .optional()
    .describe('Limits that depend on parameters; `orders` and `totals` of the set are then empty'),
  rowChoice: rowChoiceSchema.optional().describe('How a row is taken; needed with `rows`'),
  applicability: z.array(applicabilitySchema).max(10).optional(),
  shortExcursion: z
    .boolean()
    .optional()
    .describe('Single values up to 200 % for a short time are allowed (IEC 61000-3-2, class A)'),
  statistic: z
    .string()
    .max(500)
    .optional()
    .describe(
      'The statistic that the standard compares, and what a short record can state; said with each result',
    ),
};

export const limitSetSchema = z.object({
  id: z.string().describe('Published sets: a fixed name such as `iec61000-3-2.classA`; custom sets: a UUID'),
  projectId: idSchema.nullable().describe('Null for a published set'),
  version: z.number().int().min(1),
  title: z.string(),
  standard: z.string(),
  edition: z.string(),
  tableRef: z.string(),
  appliesWhen: z.string(),
  quantity: quantitySchema,
  unit: z.string().describe('Unit of an absolute limit; `%` or `mA/W` otherwise'),
  basis: limitBasisSchema,
  referenceParameter: parameterNameSchema
    .nullable()
    .describe('Parameter that `percent-of-reference` refers to'),
  procedure: limitProcedureSchema,
  parameters: z.array(parameterNameSchema).describe('Parameters a verdict must be given'),
  orders: z.array(limitEntrySchema),
  totals: z.array(totalLimitSchema),
  ...conditionsOfUse,
  source: z.array(z.string()),
  confidence: confidenceSchema,
  evidence: z.string(),
  notes: z.array(z.string()),
  familyId: idSchema.optional().describe('Custom sets: the same for all versions of a set'),
  clonedFrom: z.string().optional().describe('The set it was copied from'),
  retiredAt: timestampSchema
    .optional()
    .describe('Custom sets: since when it is no longer offered for new verdicts'),
  newestId: idSchema.optional().describe('The newest version of the set, where this is an earlier one'),
});
export type LimitSet = z.infer<typeof limitSetSchema>;
export const limitSetPageSchema = pageOf(limitSetSchema);

export const createLimitSetSchema = z
  .object({
    title: z.string().trim().min(1, 'Name the limit set').max(160),
    standard: z.string().trim().max(160).default(''),
    edition: z.string().trim().max(80).default(''),
    appliesWhen: z.string().trim().max(500).default(''),
    quantity: quantitySchema,
    unit: z.string().trim().max(20),
    basis: limitBasisSchema,
    referenceParameter: parameterNameSchema
      .optional()
      .describe('Parameter that `percent-of-reference` refers to'),
    procedure: limitProcedureSchema.optional().describe('`plain` when absent'),
    orders: z.array(limitEntrySchema).max(199).default([]),
    totals: z.array(totalLimitSchema).max(5).default([]),
    table: z
      .string()
      .max(100_000)
      .optional()
      .describe(
        'Orders and totals as delimited text in place of `orders` and `totals`: order, limit, unit, cap on each line',
      ),
    ...conditionsOfUse,
    source: z.string().trim().min(1, 'Say where the limits come from').max(500),
  })
  .refine((set) => set.orders.length > 0 || (set.rows?.length ?? 0) > 0 || set.table !== undefined, {
    message: 'Give at least one order',
    path: ['orders'],
  })
  .refine((set) => set.table === undefined || (set.orders.length === 0 && set.totals.length === 0), {
    message: 'Give the limits once: as a table or as orders and totals',
    path: ['table'],
  })
  .refine((set) => set.rows === undefined || set.rowChoice !== undefined, {
    message: 'Say how a row is taken',
    path: ['rowChoice'],
  })
  .refine((set) => set.basis !== 'percent-of-reference' || set.referenceParameter !== undefined, {
    message: 'Name the parameter that the percentages refer to',
    path: ['referenceParameter'],
  })
  .refine((set) => new Set(set.orders.map((entry) => entry.order)).size === set.orders.length, {
    message: 'Each order may stand once',
    path: ['orders'],
  });
export type CreateLimitSet = z.infer<typeof createLimitSetSchema>;

/** A copy of a published set, or of one of the same project. */
export const cloneLimitSetSchema = z.object({
  limitSetId: z.string().min(1).max(80).describe('The set to copy'),
  title: z.string().trim().min(1, 'Name the limit set').max(160).optional(),
});
export type CloneLimitSet = z.infer<typeof cloneLimitSetSchema>;

export const updateLimitSetSchema = z.object({
  retired: z.boolean().describe('A retired set stays readable and is not offered for new verdicts'),
});
export type UpdateLimitSet = z.infer<typeof updateLimitSetSchema>;

/**
 * Decision rules, ILAC-G8:09/2019: simple acceptance (4.2.1), guarded acceptance with w = U (4.2.2),
 * and the non-binary statement with a guard band (4.2.3).
 */
export const decisionRuleSchema = z.enum(['simple-acceptance', 'guarded-acceptance', 'non-binary']);
export type DecisionRule = z.infer<typeof decisionRuleSchema>;

const channelIndexSchema = z.number().int().min(0).max(maxChannelIndex);

/** A channel of another analysis of the project: the same test once more. */
export const repeatSchema = z.object({ analysisId: idSchema, channel: channelIndexSchema });
export type Repeat = z.infer<typeof repeatSchema>;

export const createVerdictSchema = z.object({
  limitSetId: z.string().min(1).max(80),
  channel: channelIndexSchema,
  parameters: verdictParametersSchema.default({}),
  decisionRule: decisionRuleSchema.default('simple-acceptance'),
  repeats: z
    .array(repeatSchema)
    .max(20)
    .optional()
    .describe('Further repeats of the test, each of the same quantity and unit'),
});
export type CreateVerdict = z.infer<typeof createVerdictSchema>;

export const verdictResultSchema = z.enum([
  'pass',
  'fail',
  'conditional-pass',
  'conditional-fail',
  'not-applicable',
  'not-decidable',
]);
export type VerdictResult = z.infer<typeof verdictResultSchema>;

export const orderVerdictSchema = z.object({
  order: z.number().int(),
  mean: z.number().nullable().describe('Value compared with the limit, in the unit of the channel'),
  smoothedMax: z.number().nullable(),
  uncertainty: z.number().nullable().describe('Expanded, k = 2'),
  limit: z.number().nullable().describe('In the unit of the channel'),
  margin: z.number().nullable().describe('limit - mean'),
  sharePercent: z.number().nullable(),
  result: verdictResultSchema.or(z.literal('disregarded')),
  reason: z.string().nullable(),
});
export type OrderVerdict = z.infer<typeof orderVerdictSchema>;

export const totalVerdictSchema = z.object({
  name: z.string(),
  value: z.number().nullable(),
  unit: z.string(),
  limit: z.number().nullable(),
  sharePercent: z.number().nullable(),
  result: verdictResultSchema,
  reason: z.string().nullable(),
});
export type TotalVerdict = z.infer<typeof totalVerdictSchema>;

/** One requirement on the test supply with what was measured; null ends are open. */
export const supplyCheckSchema = z.object({
  name: z.string(),
  unit: z.string(),
  value: z.number().nullable(),
  from: z.number().nullable(),
  upTo: z.number().nullable(),
  result: z.enum(['pass', 'fail', 'not-decidable']),
});

/** The recorded test voltage against what the standard asks of the supply. */
export const supplyVerdictSchema = z.object({
  channel: z.number().int().describe('The voltage channel'),
  channelName: z.string(),
  nominalV: z.number(),
  frequencyHz: z.number().describe('Nominal frequency'),
  assumption: z
    .string()
    .nullable()
    .describe('What was taken for granted, as a sentence: a nominal value that was not stated'),
  summary: z.string().describe('The result, and what it means for the verdict, in words'),
  result: z.enum(['pass', 'fail', 'not-decidable']),
  checks: z.array(supplyCheckSchema),
});
export type SupplyVerdict = z.infer<typeof supplyVerdictSchema>;

/** Spread of one order over the repeats of a test. */
export const repeatOrderSchema = z.object({
  order: z.number().int(),
  count: z.number().int().describe('Repeats in which it was measured'),
  repeatabilityPercent: z.number().nullable().describe('Standard deviation in percent of the limit'),
  deviationPercent: z
    .number()
    .nullable()
    .describe('Furthest mean from the mean of means, in percent of the limit'),
});
export type RepeatOrder = z.infer<typeof repeatOrderSchema>;

/** One repeat of a test in a verdict over several. */
export const verdictRepeatSchema = z.object({
  analysisId: idSchema,
  recordingId: idSchema,
  recordingNumber: z.string(),
  channel: z.number().int(),
  result: verdictResultSchema,
  reason: z.string(),
});
export type VerdictRepeat = z.infer<typeof verdictRepeatSchema>;

export const verdictSchema = z.object({
  id: idSchema,
  analysisId: idSchema,
  recordingId: idSchema,
  channel: z.number().int(),
  channelName: z.string(),
  unit: z.string(),
  limitSetId: z.string(),
  limitSet: limitSetSchema.describe('The set as it was when the verdict was made'),
  parameters: verdictParametersSchema,
  decisionRule: decisionRuleSchema,
  decisionRuleText: z.string().describe('The rule in words'),
  result: verdictResultSchema,
  reason: z.string(),
  orders: z.array(orderVerdictSchema),
  totals: z.array(totalVerdictSchema),
  supply: supplyVerdictSchema
    .nullable()
    .describe('Null where the standard asks nothing of the supply or no voltage was recorded'),
  repeats: z
    .array(verdictRepeatSchema)
    .describe('The analyses a verdict over several repeats is made of; empty for a single one'),
  repeatability: z
    .object({ isRepeatable: z.boolean().nullable(), orders: z.array(repeatOrderSchema) })
    .nullable()
    .describe('Null for a verdict over one analysis'),
  author: personRefSchema,
  createdAt: timestampSchema,
});
export type Verdict = z.infer<typeof verdictSchema>;
export const verdictPageSchema = pageOf(verdictSchema);
