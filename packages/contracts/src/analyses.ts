import { z } from 'zod';
import { idSchema, maxChannelIndex, pageOf, personRefSchema, timestampSchema } from './common.js';
import { quantitySchema, readProblemSchema } from './recordings.js';

export const profileSchema = z.enum(['mains', 'tone', 'general']);
export type Profile = z.infer<typeof profileSchema>;

export const windowNameSchema = z.enum([
  'rectangular',
  'hann',
  'hamming',
  'blackman',
  'blackman-harris',
  'nuttall',
  'flat-top',
  'kaiser',
]);

const defaultMaxOrder = 50;

/** Settings of one analysis. */
export const settingsSchema = z
  .object({
    profile: profileSchema,
    nominalFrequencyHz: z
      .union([z.literal('auto'), z.number().min(0.1).max(1e6)])
      .describe('Where to look for the fundamental, in Hz'),
    window: windowNameSchema
      .optional()
      .describe('Window of the drawn spectrum; mains windows stay rectangular'),
    maxOrder: z.number().int().min(2).max(200).optional().describe('Highest order listed, 50 when absent'),
    thdMaxOrder: z
      .number()
      .int()
      .min(2)
      .max(200)
      .optional()
      .describe('Highest order in THD, at most maxOrder; 40, tone 10 when absent'),
    cyclesPerWindow: z
      .number()
      .int()
      .min(2)
      .max(200_000)
      .optional()
      .describe('10 at 50 Hz, 12 at 60 Hz when absent'),
    span: z
      .object({ fromS: z.number().min(0), toS: z.number().positive() })
      .refine((span) => span.toS > span.fromS, {
        message: 'The span must end after it begins',
        path: ['toS'],
      })
      .optional()
      .describe('Part of the record, in seconds from its first sample'),
  })
  .refine(({ thdMaxOrder = 0, maxOrder = defaultMaxOrder }) => thdMaxOrder <= maxOrder, {
    message: 'THD cannot count orders above the highest order listed (maxOrder, 50 when absent)',
    path: ['thdMaxOrder'],
  });
export type Settings = z.infer<typeof settingsSchema>;

export const createAnalysisSchema = z.object({ settings: settingsSchema });
export type CreateAnalysis = z.infer<typeof createAnalysisSchema>;

export const flagSchema = z.object({
  code: z.string(),
  severity: z.enum(['info', 'warning', 'error']),
  message: z.string(),
});
export type Flag = z.infer<typeof flagSchema>;

export const harmonicSchema = z.object({
  order: z.number().int(),
  frequencyHz: z.number(),
  rms: z.number(),
  percentOfFundamental: z.number().nullable(),
  phaseDeg: z.number().nullable().describe('Cosine form, zero time at the first sample'),
  phaseZeroCrossingDeg: z
    .number()
    .nullable()
    .describe('Sine form, zero time at the rising zero crossing of order 1'),
  groupRms: z.number().nullable().describe('IEC 61000-4-7, 5.5.1'),
  subgroupRms: z.number().nullable().describe('IEC 61000-4-7, 5.6'),
  smoothedMeanRms: z.number().nullable().describe('Mean of the 1.5 s smoothed group values'),
  smoothedMaxRms: z.number().nullable().describe('Largest 1.5 s smoothed group value'),
});
export type Harmonic = z.infer<typeof harmonicSchema>;

export const interharmonicSchema = z.object({
  betweenOrders: z.tuple([z.number().int(), z.number().int()]),
  groupRms: z.number(),
  centredSubgroupRms: z.number(),
});

const figure = z.number().nullable();

export const channelAnalysisSchema = z.object({
  index: z.number().int(),
  name: z.string(),
  quantity: quantitySchema,
  unit: z.string(),
  mean: figure,
  rms: figure,
  peak: figure,
  crestFactor: figure,
  formFactor: figure,
  fundamental: z
    .object({
      frequencyHz: z.number(),
      rms: z.number(),
      phaseDeg: z.number().nullable(),
      frequencyUncertaintyHz: z.number().nullable(),
    })
    .nullable(),
  thdFPercent: figure,
  thdRPercent: figure,
  thdMaxOrder: z.number().int().describe('Highest order that THD counts'),
  thdPlusNPercent: figure,
  sinadDb: figure,
  snrDb: figure,
  sfdrDb: figure,
  enobBits: figure,
  harmonics: z.array(harmonicSchema),
  interharmonics: z.array(interharmonicSchema),
  windows: z
    .object({ cycles: z.number().int(), count: z.number().int(), samplesPerWindow: z.number() })
    .nullable()
    .describe('Synchronous windows of the mains profile'),
  flags: z.array(flagSchema),
});
export type ChannelAnalysis = z.infer<typeof channelAnalysisSchema>;

export const analysisStatusSchema = z.enum(['queued', 'running', 'done', 'failed']);

export const analysisSchema = z.object({
  id: idSchema,
  recordingId: idSchema,
  projectId: idSchema,
  status: analysisStatusSchema,
  progress: z.number().min(0).max(1),
  problem: readProblemSchema.nullable(),
  engineVersion: z.string().nullable(),
  settings: settingsSchema,
  supersededById: idSchema.nullable(),
  channels: z.array(channelAnalysisSchema),
  power: z.array(z.never()).describe('Voltage and current pairs; empty until power figures are computed'),
  startedBy: personRefSchema,
  createdAt: timestampSchema,
  finishedAt: timestampSchema.nullable(),
});
export type Analysis = z.infer<typeof analysisSchema>;
export const analysisPageSchema = pageOf(analysisSchema.omit({ channels: true, power: true }));

export const spectrumQuerySchema = z.object({
  channel: z.coerce.number().int().min(0).max(maxChannelIndex).default(0),
  maxPoints: z.coerce.number().int().min(16).max(20000).default(4000),
});

/** One-sided rms amplitude spectrum; when thinned, each point is the largest line of its bin. */
export const spectrumSchema = z.object({
  channel: z.number().int(),
  unit: z.string(),
  window: windowNameSchema,
  resolutionHz: z.number().describe('Spacing of the computed lines'),
  frequencyHz: z.array(z.number()),
  rms: z.array(z.number()),
});
export type Spectrum = z.infer<typeof spectrumSchema>;

const noteTarget = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('order'), order: z.number().int().min(1).max(200) }),
  z.object({ kind: z.literal('line'), frequencyHz: z.number().min(0) }),
  z.object({ kind: z.literal('span'), fromS: z.number().min(0), toS: z.number().positive() }),
]);

const noteText = z.string().trim().min(1, 'Write the note').max(2000);
const noteCause = z.string().trim().max(200).describe('What is thought to cause it');

export const createNoteSchema = z.object({
  channel: z.number().int().min(0).max(maxChannelIndex),
  target: noteTarget.describe('What the note speaks of'),
  text: noteText,
  cause: noteCause.default(''),
});
export type CreateNote = z.infer<typeof createNoteSchema>;

export const updateNoteSchema = z.object({ text: noteText, cause: noteCause }).partial();
export type UpdateNote = z.infer<typeof updateNoteSchema>;

export const noteSchema = createNoteSchema.extend({
  id: idSchema,
  analysisId: idSchema,
  text: z.string(),
  cause: z.string(),
  author: personRefSchema,
  createdAt: timestampSchema,
  updatedAt: timestampSchema,
});
export type Note = z.infer<typeof noteSchema>;
export const notePageSchema = pageOf(noteSchema);
