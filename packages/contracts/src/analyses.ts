import { z } from 'zod';
import { idSchema, maxChannelIndex, pageOf, personRefSchema, timestampSchema } from './common.js';
import {
  bandSchema,
  countedFrequencySchema,
  flagEvidenceSchema,
  harmonicFamilySchema,
  spectralLineSchema,
  statisticsSchema,
  toneSchema,
  uncertaintySchema,
} from './figures.js';
import { pairsSettingSchema, powerPairSchema, threePhaseSchema, threePhaseSettingSchema } from './power.js';
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
    kaiserBeta: z.number().min(0).max(40).optional().describe('Shape β of the Kaiser window, 9 when absent'),
    segmentLength: z
      .number()
      .int()
      .min(16)
      .max(4_194_304)
      .optional()
      .describe('General: samples per averaged segment; follows from the record when absent'),
    overlapPercent: z
      .number()
      .min(0)
      .max(95)
      .optional()
      .describe('General: overlap of segments, 50 when absent'),
    bandHz: z
      .object({ fromHz: z.number().min(0), toHz: z.number().positive() })
      .refine((band) => band.toHz > band.fromHz, {
        message: 'The band must end above its start',
        path: ['toHz'],
      })
      .optional()
      .describe('Tone: band of the band-limited THD+N'),
    pairs: pairsSettingSchema.optional().describe('Voltage and current channels that make a power'),
    threePhase: threePhaseSettingSchema.optional().describe('Sets of three phases'),
    ratedCurrentA: z.number().positive().optional().describe('Rated current for the K-factor of nameplates'),
    accuracy: z
      .array(
        z.object({
          channel: z.number().int().min(0).max(maxChannelIndex),
          readingPercent: z
            .number()
            .min(0)
            .max(100)
            .default(0)
            .describe('± limits of the instrument, of reading'),
          calibrationPercent: z
            .number()
            .min(0)
            .max(100)
            .default(0)
            .describe('Expanded uncertainty (k = 2) of the calibration, of reading'),
        }),
      )
      .max(maxChannelIndex + 1)
      .optional()
      .describe('What is known of the measuring chain of a channel, for the uncertainties'),
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
  evidence: flagEvidenceSchema.nullable(),
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
  uncertainty: z.number().nullable().describe('Expanded uncertainty of `rms`, k = 2'),
  groupStatistics: statisticsSchema.nullable().describe('Group rms over the windows'),
  subgroupStatistics: statisticsSchema.nullable().describe('Subgroup rms over the windows'),
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
  tone: toneSchema.nullable().describe('Further figures of the tone profile'),
  distortion: z
    .object({
      thd: statisticsSchema,
      thdg: statisticsSchema.nullable(),
      thds: statisticsSchema.nullable(),
      pwhd: statisticsSchema.nullable(),
    })
    .nullable()
    .describe('Mains: distortion over the windows in % (IEC 61000-4-7, 3.3)'),
  bands: z.array(bandSchema).describe('Mains: 200 Hz bands from 2 kHz to 9 kHz where the sample rate allows'),
  countedFrequency: z.array(countedFrequencySchema).describe('Mains: frequency per 10 s'),
  lines: z.array(spectralLineSchema).describe('Largest peaks of the spectrum'),
  families: z.array(harmonicFamilySchema).describe('Harmonic series found among the peaks'),
  uncertainty: z
    .record(z.string(), uncertaintySchema)
    .describe('By the name of the figure: rms, fundamental.rms, fundamental.frequencyHz, thdFPercent, …'),
  harmonics: z.array(harmonicSchema),
  interharmonics: z.array(interharmonicSchema),
  windows: z
    .object({
      cycles: z.number().int(),
      count: z.number().int(),
      samplesPerWindow: z.number(),
      flaggedCount: z
        .number()
        .int()
        .describe('Windows with a gap, a step or clipping, kept out of statistics'),
      synchronisationErrorPercent: z
        .number()
        .nullable()
        .describe('Largest deviation of a window from whole cycles'),
      gridChannel: z.number().int().describe('Channel whose fundamental sets the windows of all channels'),
    })
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
  power: z.array(powerPairSchema).describe('One entry per voltage with its current'),
  threePhase: z.array(threePhaseSchema).describe('One entry per set of three phases'),
  startedBy: personRefSchema,
  createdAt: timestampSchema,
  finishedAt: timestampSchema.nullable(),
});
export type Analysis = z.infer<typeof analysisSchema>;
export const analysisPageSchema = pageOf(
  analysisSchema.omit({ channels: true, power: true, threePhase: true }),
);

export const spectrumQuerySchema = z.object({
  channel: z.coerce.number().int().min(0).max(maxChannelIndex).default(0),
  maxPoints: z.coerce.number().int().min(16).max(20000).default(4000),
  scaling: z.enum(['spectrum', 'density']).default('spectrum').describe('rms per line, or rms per √Hz'),
});

/** One-sided rms amplitude spectrum; when thinned, each point is the largest line of its bin. */
export const spectrumSchema = z.object({
  channel: z.number().int(),
  unit: z.string(),
  window: windowNameSchema,
  resolutionHz: z.number().describe('Spacing of the computed lines'),
  noiseBandwidthHz: z
    .number()
    .nullable()
    .describe('Equivalent noise bandwidth of a line; null in analyses made before it was kept'),
  segments: z
    .number()
    .int()
    .nullable()
    .describe('How many segments were averaged; null in analyses made before it was kept'),
  scaling: z.enum(['spectrum', 'density']),
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
