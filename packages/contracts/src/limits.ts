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
});
export type LimitEntry = z.infer<typeof limitEntrySchema>;

/** Limit on a total, such as THD. */
export const totalLimitSchema = z.object({
  name: z.enum(['THD', 'THC', 'POHC', 'PWHC', 'TDD']),
  limit: z.number().positive(),
  maxOrder: z.number().int().min(2).max(200),
});

/** How single smoothed values and small currents are treated. */
export const limitProcedureSchema = z.enum(['iec61000-3-2', 'plain']);

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
  source: z.array(z.string()),
  confidence: confidenceSchema,
  evidence: z.string(),
  notes: z.array(z.string()),
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
    basis: z.enum(['absolute', 'percent-of-fundamental']),
    orders: z
      .array(limitEntrySchema.omit({ capA: true }))
      .min(1, 'Give at least one order')
      .max(199),
    totals: z.array(totalLimitSchema).max(5).default([]),
    source: z.string().trim().min(1, 'Say where the limits come from').max(500),
  })
  .refine((set) => new Set(set.orders.map((entry) => entry.order)).size === set.orders.length, {
    message: 'Each order may stand once',
    path: ['orders'],
  });
export type CreateLimitSet = z.infer<typeof createLimitSetSchema>;

/**
 * Decision rules, ILAC-G8:09/2019: simple acceptance (4.2.1), guarded acceptance with w = U (4.2.2),
 * and the non-binary statement with a guard band (4.2.3).
 */
export const decisionRuleSchema = z.enum(['simple-acceptance', 'guarded-acceptance', 'non-binary']);
export type DecisionRule = z.infer<typeof decisionRuleSchema>;

export const createVerdictSchema = z.object({
  limitSetId: z.string().min(1).max(80),
  channel: z.number().int().min(0).max(maxChannelIndex),
  parameters: verdictParametersSchema.default({}),
  decisionRule: decisionRuleSchema.default('simple-acceptance'),
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
  author: personRefSchema,
  createdAt: timestampSchema,
});
export type Verdict = z.infer<typeof verdictSchema>;
export const verdictPageSchema = pageOf(verdictSchema);
