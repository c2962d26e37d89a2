import { z } from 'zod';
import {
  idSchema,
  maxChannelIndex,
  pageOf,
  pageQuerySchema,
  personRefSchema,
  timestampSchema,
} from './common.js';
import {
  decisionRuleSchema,
  orderVerdictSchema,
  totalVerdictSchema,
  verdictParametersSchema,
  verdictResultSchema,
} from './limits.js';
import { quantitySchema } from './recordings.js';

const maxCoefficients = 41;
const finite = z.number().min(-1e300).max(1e300);

const complexSchema = z.strictObject({ re: finite, im: finite });
const delaySchema = z.number().min(0).max(1e3).optional().describe('Pure delay in s');

/** A stage that stands on its own; names and units of the values as `circuitKinds` of packages/dsp has them. */
const openStageSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('coefficients'),
    numerator: z.array(finite).min(1).max(maxCoefficients).describe('Descending powers of s'),
    denominator: z.array(finite).min(1).max(maxCoefficients).describe('Descending powers of s'),
    delayS: delaySchema,
  }),
  z.strictObject({
    kind: z.literal('zeros-poles-gain'),
    zeros: z
      .array(complexSchema)
      .max(maxCoefficients - 1)
      .describe('In 1/s'),
    poles: z
      .array(complexSchema)
      .max(maxCoefficients - 1)
      .describe('In 1/s'),
    gain: finite,
    delayS: delaySchema,
  }),
  z.strictObject({
    kind: z.literal('circuit'),
    circuit: z.string().min(1).max(60),
    values: z.record(z.string().max(60), finite).describe('In base units, by the names of the parameters'),
  }),
]);

/** A stage as it is entered and stored: `StageSpec` of packages/dsp. */
export const stageSpecSchema = z.discriminatedUnion('kind', [
  ...openStageSchema.options,
  z.strictObject({
    kind: z.literal('closed-loop'),
    controller: z.strictObject({
      gain: finite,
      integralTimeS: z.number().positive().optional(),
      derivativeTimeS: z.number().positive().optional(),
      derivativeFilter: z.number().positive().optional(),
    }),
    plant: z.array(openStageSchema).min(1).max(8).describe('In series'),
    output: z.enum(['reference-to-output', 'reference-to-error', 'disturbance-to-output']),
    padeOrder: z.number().int().min(1).max(10).optional().describe('For delays of the plant'),
  }),
]);

/** How a value of a stage may differ from what is stated. */
export const valueToleranceSchema = z.strictObject({
  parameter: z.string().max(60),
  tolerancePercent: z.number().min(0).lt(100),
  distribution: z.enum(['uniform', 'normal']).optional().describe('For draws; uniform when absent'),
});

/** One stage of a study. */
export const studyStageSchema = z.strictObject({
  name: z.string().trim().max(80),
  isOn: z.boolean().describe('A stage that is off stays in the study and lets everything through'),
  spec: stageSpecSchema,
  tolerances: z.array(valueToleranceSchema).max(10).default([]),
});
export type StudyStage = z.infer<typeof studyStageSchema>;

/** A periodic signal by its Fourier series; phases in cosine form, t = 0 at the start of a cycle. */
export const fourierSeriesSchema = z.strictObject({
  frequencyHz: z.number().positive().max(1e9),
  dc: finite,
  components: z
    .array(
      z.strictObject({
        order: z.number().int().min(1).max(1000),
        rms: z.number().min(0).max(1e300),
        phaseDeg: z.number().nullable(),
      }),
    )
    .min(1)
    .max(1000)
    .refine((rows) => new Set(rows.map(({ order }) => order)).size === rows.length, {
      message: 'Each order may stand once',
    }),
  restRms: z.number().min(0).optional().describe('rms of what is left beside DC and the orders'),
});

export type StudySeries = z.infer<typeof fourierSeriesSchema>;

/** Where the harmonics of a study come from. */
export const studyInputSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('channel'),
    analysisId: idSchema,
    channel: z.number().int().min(0).max(maxChannelIndex),
  }),
  z.strictObject({
    kind: z.literal('wave'),
    shape: z.enum(['sine', 'square', 'triangle', 'sawtooth', 'pulse', 'half-wave', 'full-wave', 'six-pulse']),
    amplitude: z.number().positive().max(1e12),
    frequencyHz: z.number().positive().max(1e9),
    dutyPercent: z.number().gt(0).lt(100).optional().describe('Of a pulse'),
    maxOrder: z.number().int().min(1).max(1000),
  }),
  z.strictObject({ kind: z.literal('harmonics'), series: fourierSeriesSchema }),
]);
export type StudyInput = z.infer<typeof studyInputSchema>;

/** What a study says, version by version; the harmonics that it starts from are kept with it. */
export const studyDefinitionSchema = z.strictObject({
  input: studyInputSchema,
  inputQuantity: quantitySchema,
  inputUnit: z.string().trim().max(20),
  outputQuantity: quantitySchema,
  outputUnit: z.string().trim().max(20),
  stages: z.array(studyStageSchema).max(12),
  thdMaxOrder: z.number().int().min(2).max(1000).default(40),
  judgement: z
    .strictObject({
      limitSetId: z.string().min(1).max(80),
      parameters: verdictParametersSchema,
      decisionRule: decisionRuleSchema,
      of: z.enum(['input', 'output', 'both']).default('both'),
    })
    .nullable(),
  resonance: z
    .strictObject({
      bandPercent: z.number().positive().max(50).describe('How near an order counts, in percent of the peak'),
      minGain: z.number().positive().describe('Gain of a peak from which it counts'),
    })
    .default({ bandPercent: 10, minGain: 1.5 }),
  spread: z
    .strictObject({
      method: z.enum(['corners', 'draws']),
      draws: z.number().int().min(10).max(20_000).default(1000),
      seed: z.number().int().min(0).max(0xffffffff).default(1),
    })
    .nullable()
    .default(null),
  assumptions: z.string().trim().max(4000).default('').describe('What the prediction rests on'),
});
export type StudyDefinition = z.infer<typeof studyDefinitionSchema>;

const complexPlaceSchema = z.object({ re: z.number(), im: z.number(), multiplicity: z.number().int() });

/** One order before and behind the stages. */
export const studyOrderSchema = z.object({
  order: z.number().int(),
  frequencyHz: z.number(),
  inputRms: z.number(),
  outputRms: z.number(),
  inputPhaseDeg: z.number().nullable(),
  outputPhaseDeg: z.number().nullable(),
  gain: z.number().nullable(),
});

const seriesFiguresSchema = z.object({
  rms: z.number(),
  fundamentalRms: z.number(),
  thdF: z.number().nullable().describe('As a ratio'),
  thdR: z.number().nullable().describe('As a ratio'),
  peak: z.number().nullable(),
  crestFactor: z.number().nullable(),
});

const predictedVerdictSchema = z.object({
  result: verdictResultSchema,
  reason: z.string(),
  decisionRuleText: z.string(),
  orders: z.array(orderVerdictSchema),
  totals: z.array(totalVerdictSchema),
});

/** What the server worked out when a version was saved; no steady state, no figures behind the stages. */
export const studyResultSchema = z.object({
  engineVersion: z.string(),
  stability: z.object({
    verdict: z.enum(['stable', 'marginal', 'unstable']),
    reason: z.string(),
    poles: z.array(complexPlaceSchema).describe('Of all stages, in 1/s'),
  }),
  input: seriesFiguresSchema,
  output: seriesFiguresSchema.nullable(),
  orders: z.array(studyOrderSchema).describe('Empty without a steady state'),
  verdictBefore: predictedVerdictSchema.nullable(),
  verdictAfter: predictedVerdictSchema.nullable(),
  warnings: z.array(
    z.object({ order: z.number().int(), peakHz: z.number(), peakGain: z.number(), message: z.string() }),
  ),
  spread: z
    .object({
      sharePassing: z.number().nullable().describe('Of the draws or corners, 0 to 1; null without limits'),
      worstOrder: z.number().int().nullable(),
      orders: z.array(z.object({ order: z.number().int(), min: z.number(), max: z.number() })),
    })
    .nullable(),
});
export type StudyResult = z.infer<typeof studyResultSchema>;

export const createStudySchema = z.strictObject({
  name: z.string().trim().min(1, 'Name the study').max(160),
  definition: studyDefinitionSchema,
  comment: z.string().trim().max(500).default(''),
});
export type CreateStudy = z.infer<typeof createStudySchema>;

/** A new version; the earlier ones stay as they are. */
export const saveStudySchema = z.strictObject({
  definition: studyDefinitionSchema,
  comment: z.string().trim().max(500).default('').describe('What is new in this version'),
  basedOn: z
    .number()
    .int()
    .min(1)
    .describe('The version that was changed; refused when there is a newer one'),
});
export type SaveStudy = z.infer<typeof saveStudySchema>;

export const updateStudySchema = z
  .strictObject({ name: z.string().trim().min(1).max(160), retired: z.boolean() })
  .partial();
export type UpdateStudy = z.infer<typeof updateStudySchema>;

export const studyVersionRefSchema = z.object({
  id: idSchema,
  version: z.number().int(),
  comment: z.string(),
  author: personRefSchema,
  createdAt: timestampSchema,
});

/** A study as of one of its versions. */
export const studySchema = z.object({
  id: idSchema,
  projectId: idSchema,
  number: z.string().describe('Number in the project, S-0001'),
  name: z.string(),
  version: z.number().int(),
  versionId: idSchema,
  versions: z.array(studyVersionRefSchema).describe('The newest first'),
  definition: studyDefinitionSchema,
  series: fourierSeriesSchema.describe('The harmonics that it starts from, as they were when it was saved'),
  result: studyResultSchema,
  retiredAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
});
export type Study = z.infer<typeof studySchema>;

export const studyListItemSchema = studySchema
  .pick({
    id: true,
    projectId: true,
    number: true,
    name: true,
    version: true,
    versionId: true,
    retiredAt: true,
    createdAt: true,
  })
  .extend({
    stability: z.enum(['stable', 'marginal', 'unstable']),
    resultBefore: verdictResultSchema.nullable(),
    resultAfter: verdictResultSchema.nullable(),
    author: personRefSchema,
    savedAt: timestampSchema,
  });
export type StudyListItem = z.infer<typeof studyListItemSchema>;
export const studyPageSchema = pageOf(studyListItemSchema);
export const studyQuerySchema = pageQuerySchema.extend({
  q: z.string().trim().max(200).optional().describe('Looks in number and name'),
});
export type StudyQuery = z.infer<typeof studyQuerySchema>;
export const studyVersionQuerySchema = z.object({
  version: z.coerce.number().int().min(1).optional().describe('The newest when absent'),
});
export const studyComparisonQuerySchema = studyVersionQuerySchema.extend({
  analysisId: idSchema.describe('An analysis of a recording of the same project'),
  channel: z.coerce.number().int().min(0).max(maxChannelIndex),
});
export type StudyComparisonQuery = z.infer<typeof studyComparisonQuerySchema>;

/** Predicted against measured, order by order. */
export const studyComparisonSchema = z.object({
  study: studyVersionRefSchema.pick({ id: true, version: true }),
  analysisId: idSchema,
  channel: z.number().int(),
  unit: z.string(),
  predictedHz: z.number(),
  measuredHz: z.number().nullable(),
  orders: z.array(
    z.object({
      order: z.number().int(),
      predictedRms: z.number().nullable(),
      measuredRms: z.number().nullable(),
      differencePercent: z.number().nullable().describe('Of the measured value'),
      measuredUncertainty: z.number().nullable().describe('Expanded, k = 2'),
    }),
  ),
  predictedThdF: z.number().nullable(),
  measuredThdF: z.number().nullable(),
  frequencyTolerancePercent: z.number().describe('Within which both count as the same frequency'),
  cautions: z.array(z.string()).describe('What stands against comparing the two, in words'),
});
export type StudyComparison = z.infer<typeof studyComparisonSchema>;

const reportStageValueSchema = z.object({
  symbol: z.string(),
  meaning: z.string(),
  value: z.number().describe('In the unit beside it, without prefix'),
  unit: z.string(),
  tolerancePercent: z.number().nullable(),
});

/** One stage as a report says it. */
const reportStageSchema = z.object({
  name: z.string(),
  kind: z.string().describe('In words'),
  meaning: z.string().describe('Output over input'),
  isOn: z.boolean(),
  values: z.array(reportStageValueSchema),
  words: z.string().describe('What has no single values, such as coefficients; else empty'),
});
export type ReportStage = z.infer<typeof reportStageSchema>;

/** A version of a study as a report shows it: a prediction, not a measurement. */
export const reportStudySchema = z.object({
  id: idSchema,
  versionId: idSchema,
  number: z.string(),
  name: z.string(),
  version: z.number().int(),
  author: personRefSchema,
  savedAt: timestampSchema,
  source: z.object({
    words: z.string().describe('Where the harmonics that it starts from come from'),
    recordingId: idSchema.nullable(),
    analysisId: idSchema.nullable(),
  }),
  ...studyDefinitionSchema.pick({
    inputQuantity: true,
    inputUnit: true,
    outputQuantity: true,
    outputUnit: true,
    thdMaxOrder: true,
  }).shape,
  limitSet: z.object({ id: z.string(), title: z.string() }).nullable(),
  stages: z.array(reportStageSchema),
  spreadWords: z.string().nullable().describe('How tolerances were tried; null where they were not'),
  assumptions: z.string(),
  result: studyResultSchema,
  response: z
    .array(z.object({ frequencyHz: z.number(), gainDb: z.number().nullable() }))
    .describe('Gain of all stages; empty without a steady state'),
});
export type ReportStudy = z.infer<typeof reportStudySchema>;
