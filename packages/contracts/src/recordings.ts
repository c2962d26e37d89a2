import { z } from 'zod';
import {
  idSchema,
  maxChannelIndex,
  pageOf,
  pageQuerySchema,
  personRefSchema,
  timestampSchema,
} from './common.js';
import { equipmentRefSchema, operatingModeSchema, testConditionsSchema } from './equipment.js';
import { chainRefSchema } from './instruments.js';

export const quantitySchema = z.enum([
  'voltage',
  'current',
  'power',
  'sound_pressure',
  'acceleration',
  'velocity',
  'dimensionless',
  'other',
]);
export type Quantity = z.infer<typeof quantitySchema>;

const scaleLimit = 1e12;

/** Gain or offset: large enough for any transducer, small enough that every figure stays finite. */
const scaleSchema = z.number().min(-scaleLimit).max(scaleLimit);

const positiveScaleSchema = z
  .number()
  .positive()
  .min(1 / scaleLimit)
  .max(scaleLimit);

const columnSchema = z.union([z.number().int().min(0), z.string().min(1).max(200)]);

/** How a file is to be read; what is absent is detected. */
export const importOptionsSchema = z.strictObject({
  sampleRateHz: z.number().min(1e-3).max(1e10).optional().describe('Sample rate in Hz'),
  delimiter: z.enum([',', ';', '\t', ' ', '|']).optional(),
  decimal: z.enum(['.', ',']).optional(),
  headerRows: z.number().int().min(0).max(1000).optional().describe('Lines before the first row of numbers'),
  timeColumn: columnSchema
    .nullable()
    .optional()
    .describe('Index from 0 or header name; null: no time column'),
  timeUnit: z.enum(['s', 'ms', 'us', 'ns']).optional(),
  channels: z
    .array(
      z.strictObject({
        column: columnSchema.describe('Index from 0 or header name; for files without columns the channel'),
        name: z.string().trim().min(1).max(80).optional(),
        quantity: quantitySchema.optional(),
        unit: z.string().trim().max(20).optional(),
        gain: scaleSchema.optional().describe('Engineering value = gain x stored value + offset'),
        offset: scaleSchema.optional(),
        fullScale: positiveScaleSchema
          .optional()
          .describe('Input in the unit at digital full scale (WAV: stored value 1); multiplies the gain'),
        probeRatio: positiveScaleSchema
          .optional()
          .describe('100 for a probe or transformer of 100:1; multiplies the gain'),
        inverted: z.boolean().optional().describe('Turns the sign of the gain'),
      }),
    )
    .min(1)
    .max(512)
    .optional()
    .describe('Columns to keep; absent: all value columns'),
  missingValues: z
    .enum(['keep', 'interpolate', 'refuse'])
    .optional()
    .describe('Cells without a number: kept as missing (default), bridged by a straight line, or no reading'),
  unevenTime: z
    .enum(['resample', 'take-as-even', 'refuse'])
    .optional()
    .describe(
      'Time stamps that are not even: resampled (default), taken as even at the mean rate, or no reading',
    ),
});
export type ImportOptions = z.infer<typeof importOptionsSchema>;

/** Where the import options that go with a file come from. */
export const readingRuleIdSchema = idSchema
  .nullable()
  .optional()
  .describe(
    'Reading rule of the project that the import options come from; without options its own are used. null: no rule, ' +
      'what is not stated is detected. Absent: options that are stated come from no rule; without any (or {}), those of ' +
      'the rule that fits the file are used',
  );

/** How a recording is to be read again. */
export const readAgainSchema = importOptionsSchema.extend({ readingRuleId: readingRuleIdSchema });
export type ReadAgain = z.infer<typeof readAgainSchema>;

/** A reading rule as a recording names it; `id` is null once the rule is deleted. */
export const readingRuleRefSchema = z.object({ id: idSchema.nullable(), name: z.string() });

/** Why a recording or an analysis failed, in words for the person who uploaded it. */
export const readProblemSchema = z.object({
  code: z.string(),
  message: z.string(),
  cure: z.string(),
  line: z.number().int().optional(),
  column: z.number().int().optional(),
});
export type ReadProblem = z.infer<typeof readProblemSchema>;

export const readWarningSchema = z.object({
  code: z.string(),
  message: z.string(),
  count: z.number().int().optional(),
  firstLine: z.number().int().optional(),
  samples: z
    .array(z.number().int())
    .optional()
    .describe('The first samples it happened before, counted from 0'),
  value: z.number().optional().describe('The largest figure that was compared'),
  limit: z.number().optional().describe('What it was compared with'),
  unit: z.string().optional().describe('Unit of value and limit'),
});
export type ReadWarning = z.infer<typeof readWarningSchema>;

export const recordingStatusSchema = z.enum(['received', 'reading', 'analysing', 'ready', 'failed']);
export type RecordingStatus = z.infer<typeof recordingStatusSchema>;

export const channelSchema = z.object({
  index: z.number().int(),
  name: z.string(),
  quantity: quantitySchema,
  unit: z.string(),
  gain: z.number(),
  offset: z.number(),
});
export type Channel = z.infer<typeof channelSchema>;

/** A channel as its recording lists it. */
export const recordedChannelSchema = channelSchema.extend({
  chain: chainRefSchema.nullable().describe('Measuring chain of its own; null: that of the recording'),
});
export type RecordedChannel = z.infer<typeof recordedChannelSchema>;

/** Figures of one channel of the latest analysis, enough for a list row and its tally strip. */
export const channelSummarySchema = z.object({
  channel: z.number().int(),
  name: z.string(),
  quantity: quantitySchema,
  unit: z.string(),
  fundamentalHz: z.number().nullable(),
  rms: z.number(),
  thdFPercent: z.number().nullable(),
  harmonicRms: z.array(z.number()).describe('rms of orders 1, 2, 3 … as far as computed'),
});
export type ChannelSummary = z.infer<typeof channelSummarySchema>;

const bench = {
  name: z.string().trim().min(1).max(160),
  eut: z.string().trim().max(200).describe('Equipment under test, with serial number'),
  measuringChain: z.string().trim().max(200).describe('Transducers and front end'),
  instrument: z.string().trim().max(200).describe('Recording instrument, serial number, calibration'),
  capturedAt: timestampSchema.nullable(),
  remark: z.string().trim().max(2000),
};

/** What was tested, how, through what and under which conditions. */
const standing = {
  equipmentId: idSchema
    .nullable()
    .describe('Equipment of the project; eut becomes its line unless it is stated as well'),
  operatingModeId: idSchema.nullable().describe('Operating mode of that equipment'),
  measuringChainId: idSchema.nullable(),
  conditions: testConditionsSchema.describe('Replaces all that was said of the conditions'),
};

export const updateRecordingSchema = z
  .object({
    ...bench,
    ...standing,
    channels: z
      .array(
        z.object({
          index: z.number().int().min(0),
          name: z.string().trim().min(1).max(80).optional(),
          quantity: quantitySchema.optional(),
          unit: z.string().trim().max(20).optional(),
          gain: scaleSchema.optional(),
          offset: scaleSchema.optional(),
          measuringChainId: idSchema
            .nullable()
            .optional()
            .describe('Where it differs from that of the recording; needs no new analysis'),
        }),
      )
      .describe('Scaling changes are followed by a new analysis'),
  })
  .partial();
export type UpdateRecording = z.infer<typeof updateRecordingSchema>;

export const recordingSchema = z.object({
  id: idSchema,
  projectId: idSchema,
  number: z.string().describe('Number in the project, R-0001'),
  ...bench,
  equipment: equipmentRefSchema.nullable(),
  operatingMode: operatingModeSchema.extend({ retired: z.boolean() }).nullable(),
  chain: chainRefSchema.nullable(),
  conditions: testConditionsSchema,
  status: recordingStatusSchema,
  progress: z.number().min(0).max(1),
  problem: readProblemSchema.nullable(),
  warnings: z.array(readWarningSchema),
  file: z.object({ name: z.string(), size: z.number().int(), sha256: z.string() }),
  duplicateOf: z
    .object({ id: idSchema, number: z.string() })
    .nullable()
    .describe('Earlier recording of the project with the same bytes'),
  format: z.string().nullable(),
  metadata: z.record(z.string(), z.string()),
  import: importOptionsSchema.describe('The options it was read with'),
  readingRule: readingRuleRefSchema.nullable().describe('The reading rule the options came from'),
  sampleRateHz: z.number().nullable(),
  sampleCount: z.number().int().nullable(),
  durationS: z.number().nullable(),
  channels: z.array(recordedChannelSchema),
  latestAnalysisId: idSchema.nullable(),
  summaries: z.array(channelSummarySchema),
  uploadedBy: personRefSchema,
  createdAt: timestampSchema,
});
export type Recording = z.infer<typeof recordingSchema>;
export const recordingPageSchema = pageOf(recordingSchema);

export const recordingSortSchema = z.enum(['number', '-number', 'name', '-name', 'createdAt', '-createdAt']);

export const recordingQuerySchema = pageQuerySchema.extend({
  q: z.string().trim().max(200).optional().describe('Looks in number, name, EUT, equipment, file name'),
  status: recordingStatusSchema.optional(),
  equipmentId: idSchema.optional().describe('Recordings of this equipment'),
  sort: recordingSortSchema.default('-number'),
});
export type RecordingQuery = z.infer<typeof recordingQuerySchema>;

/** A channel over the first cycles of a file, scaled as it would be read. */
export const previewSignalSchema = z.object({
  column: z.number().int(),
  name: z.string(),
  quantity: quantitySchema,
  unit: z.string(),
  startS: z.number(),
  stepS: z.number().describe('Time between values'),
  values: z
    .array(z.number().nullable())
    .describe('At most 2000 values of the beginning; null where one is missing'),
  rms: z.number().nullable().describe('Over all of the beginning that was looked at'),
  peak: z.number().nullable().describe('Largest magnitude, over the same'),
  fundamentalHz: z.number().nullable().describe('null: none found, or too few cycles'),
});
export type PreviewSignal = z.infer<typeof previewSignalSchema>;

/** Preview of a file's beginning under given options. */
export const importPreviewSchema = z.object({
  format: z.enum(['csv', 'wav', 'npy', 'comtrade']).nullable(),
  lines: z.array(z.string()).describe('The first lines as they stand'),
  columns: z.array(
    z.object({ index: z.number().int(), name: z.string(), unit: z.string(), quantity: quantitySchema }),
  ),
  rows: z.array(z.array(z.union([z.string(), z.number(), z.null()]))),
  delimiter: z.string().nullable(),
  decimal: z.string().nullable(),
  headerRows: z.number().int().nullable(),
  timeColumn: z.number().int().nullable(),
  timeUnit: z.string().nullable(),
  sampleRateHz: z.number().nullable(),
  confident: z.boolean(),
  doubts: z.array(z.string()),
  problem: readProblemSchema.nullable(),
  clockColumns: z.array(z.number().int()).describe('Columns that tell the time, the time column included'),
  signals: z.array(previewSignalSchema).describe('At most eight channels; empty where nothing can be read'),
  readingRule: readingRuleRefSchema.nullable().describe('The reading rule that fits the file'),
  options: importOptionsSchema.describe(
    'The options of this preview: as given, else those of the reading rule',
  ),
});
export type ImportPreview = z.infer<typeof importPreviewSchema>;

export const waveformQuerySchema = z.object({
  channel: z.coerce.number().int().min(0).max(maxChannelIndex).default(0),
  fromS: z.coerce.number().min(0).optional(),
  toS: z.coerce.number().positive().optional(),
  points: z.coerce.number().int().min(2).max(8000).default(2000),
});
export type WaveformQuery = z.infer<typeof waveformQuerySchema>;

/** Samples, or one minimum and maximum per bin when more samples than points are asked for. */
export const waveformSchema = z.object({
  channel: z.number().int(),
  unit: z.string(),
  kind: z.enum(['samples', 'envelope']),
  fromS: z.number(),
  toS: z.number(),
  startS: z.number().describe('Time of the first point'),
  stepS: z.number().describe('Time between points'),
  values: z.array(z.number().nullable()).describe('kind samples: the samples; else empty'),
  minimum: z.array(z.number().nullable()).describe('kind envelope; else empty'),
  maximum: z.array(z.number().nullable()).describe('kind envelope; else empty'),
});
export type Waveform = z.infer<typeof waveformSchema>;
