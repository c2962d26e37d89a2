import { z } from 'zod';
import { analysisSchema, channelAnalysisSchema, noteSchema, settingsSchema } from './analyses.js';
import { idSchema, pageOf, personRefSchema, timestampSchema } from './common.js';
import { equipmentSchema, operatingModeSchema, testConditionsSchema } from './equipment.js';
import { laboratorySchema, measuringChainSchema } from './instruments.js';
import { verdictResultSchema, verdictSchema } from './limits.js';
import { recordingSchema, waveformSchema } from './recordings.js';
import { seriesSchema } from './series.js';

export const reportStatusSchema = z.enum(['draft', 'in-review', 'issued', 'superseded']);
export type ReportStatus = z.infer<typeof reportStatusSchema>;

/** To whom an issued report is sent. */
export const reportRecipientSchema = z.object({
  name: z.string().trim().max(120).default(''),
  email: z
    .email('Give an e-mail address')
    .max(254)
    .transform((email) => email.toLowerCase()),
});
export type ReportRecipient = z.infer<typeof reportRecipientSchema>;

const fields = {
  title: z.string().trim().min(1, 'Name the report').max(200),
  verdictIds: z
    .array(idSchema)
    .min(1, 'Choose at least one verdict')
    .max(50)
    .refine((ids) => new Set(ids).size === ids.length, { message: 'Each verdict may stand once' }),
  summary: z.string().trim().max(4000).describe('What the reader needs to know first'),
};

export const createReportSchema = z.object({ ...fields, summary: fields.summary.default('') });
export type CreateReport = z.infer<typeof createReportSchema>;

export const updateReportSchema = z.object(fields).partial();
export type UpdateReport = z.infer<typeof updateReportSchema>;

/** Comment that goes with a step; needed when a report is returned. */
export const reportStepSchema = z.object({ comment: z.string().trim().max(2000).default('') });
export const returnReportSchema = z.object({
  comment: z.string().trim().min(1, 'Say what must be mended').max(2000),
});
export type ReportStep = z.infer<typeof reportStepSchema>;

export const reportEventSchema = z.object({
  kind: z.enum(['created', 'changed', 'submitted', 'returned', 'issued', 'superseded']),
  by: personRefSchema,
  at: timestampSchema,
  comment: z.string(),
});
export type ReportEvent = z.infer<typeof reportEventSchema>;

/** First cycles of the judged channel, for the figure in the report: one value a point, or a minimum and a maximum. */
export const waveformExcerptSchema = waveformSchema
  .pick({ unit: true, kind: true, startS: true, stepS: true, values: true, minimum: true, maximum: true })
  .describe('At most 800 points, to six significant digits');
export type WaveformExcerpt = z.infer<typeof waveformExcerptSchema>;

/** The judged channel's distortion over time, for the figure in the report. */
export const distortionSeriesSchema = seriesSchema
  .pick({ unit: true, intervalS: true, timeS: true, value: true, thinned: true })
  .describe('THD of subgroups from window to window; when thinned, the largest of each stretch');
export type DistortionSeries = z.infer<typeof distortionSeriesSchema>;

/** One recording judged, with all that its pages in the report show. */
export const reportSectionSchema = z.object({
  verdict: verdictSchema,
  recording: recordingSchema.pick({
    id: true,
    number: true,
    name: true,
    eut: true,
    measuringChain: true,
    instrument: true,
    capturedAt: true,
    file: true,
    sampleRateHz: true,
    sampleCount: true,
    durationS: true,
    metadata: true,
    import: true,
  }),
  analysis: analysisSchema.pick({ id: true, engineVersion: true, finishedAt: true }).extend({
    settings: settingsSchema,
    channel: channelAnalysisSchema,
  }),
  notes: z.array(noteSchema),
  equipment: equipmentSchema
    .pick({
      id: true,
      name: true,
      manufacturer: true,
      model: true,
      serialNumber: true,
      ratings: true,
      receivedOn: true,
      remark: true,
    })
    .nullable()
    .describe('Null: the recording names its equipment in words only'),
  operatingMode: operatingModeSchema.nullable(),
  chain: measuringChainSchema
    .nullable()
    .describe('As it stood when the recording was captured; null: named in words only'),
  conditions: testConditionsSchema,
  waveform: waveformExcerptSchema.nullable().describe('Null: its samples could not be read'),
  distortion: distortionSeriesSchema.nullable().describe('Null: nothing was followed over time'),
});
export type ReportSection = z.infer<typeof reportSectionSchema>;

/** Everything a report says, frozen from submission on, so that what was reviewed is what is issued. */
export const reportContentSchema = z.object({
  project: z.object({
    id: idSchema,
    name: z.string(),
    customer: z.string(),
    customerContact: z.string(),
  }),
  laboratory: laboratorySchema,
  sections: z.array(reportSectionSchema),
  result: verdictResultSchema.describe('The worst of the verdicts'),
});
export type ReportContent = z.infer<typeof reportContentSchema>;

const revisionRefSchema = z.object({
  id: idSchema,
  revision: z.number().int(),
  status: reportStatusSchema,
});
export type RevisionRef = z.infer<typeof revisionRefSchema>;

export const reportSchema = z.object({
  id: idSchema,
  projectId: idSchema,
  number: z.string().nullable().describe('Given when issued: HR-0001'),
  revision: z.number().int(),
  title: z.string(),
  summary: z.string(),
  deviations: z.string().describe('Additions to, deviations or exclusions from the method'),
  recipients: z.array(z.object({ name: z.string(), email: z.string() })),
  replaces: revisionRefSchema.nullable().describe('The issued revision it replaces once it is issued'),
  replacedBy: revisionRefSchema.nullable().describe('The revision made to replace it'),
  overdueReason: z
    .string()
    .nullable()
    .describe('Why it was issued although calibrations were overdue; null where none was'),
  status: reportStatusSchema,
  verdictIds: z.array(idSchema),
  content: reportContentSchema.describe('Live for a draft, frozen while in review and once issued'),
  events: z.array(reportEventSchema),
  preparedBy: personRefSchema,
  issuedBy: personRefSchema.nullable(),
  issuedAt: timestampSchema.nullable(),
  pdfSha256: z.string().nullable(),
  jsonSha256: z.string().nullable(),
  csvSha256: z.string().nullable(),
  checkCode: z.string().nullable().describe('With the number it opens the public check page'),
  createdAt: timestampSchema,
  updatedAt: timestampSchema,
});
export type Report = z.infer<typeof reportSchema>;

export const reportListItemSchema = reportSchema
  .omit({ content: true, events: true, verdictIds: true, recipients: true })
  .extend({ result: verdictResultSchema, sections: z.number().int() });
export type ReportListItem = z.infer<typeof reportListItemSchema>;
export const reportPageSchema = pageOf(reportListItemSchema);

/** Path of the public check page of an issued report, as its PDF and its QR code name it. */
export const reportCheckPath = (number: string, code: string): string =>
  `/check/${encodeURIComponent(number)}/${encodeURIComponent(code)}`;
