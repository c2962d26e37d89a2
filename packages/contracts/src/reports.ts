import { z } from 'zod';
import { analysisSchema, channelAnalysisSchema, noteSchema, settingsSchema } from './analyses.js';
import { idSchema, pageOf, personRefSchema, timestampSchema } from './common.js';
import { equipmentSchema, operatingModeSchema, testConditionsSchema } from './equipment.js';
import { laboratorySchema, measuringChainSchema } from './instruments.js';
import { verdictResultSchema, verdictSchema } from './limits.js';
import { recordingSchema, waveformSchema } from './recordings.js';
import { seriesSchema } from './series.js';
import { reportStudySchema } from './studies.js';

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
    .max(50)
    .refine((ids) => new Set(ids).size === ids.length, { message: 'Each verdict may stand once' }),
  studyVersionIds: z
    .array(idSchema)
    .max(20)
    .refine((ids) => new Set(ids).size === ids.length, { message: 'Each study may stand once' })
    .describe('Versions of studies that it shows as predictions'),
  summary: z.string().trim().max(4000).describe('What the reader needs to know first'),
  deviations: z
    .string()
    .trim()
    .max(4000)
    .describe('Additions to, deviations or exclusions from the method (ISO/IEC 17025:2017, 7.8.2.1 n)'),
  recipients: z
    .array(reportRecipientSchema)
    .max(20)
    .refine((all) => new Set(all.map(({ email }) => email)).size === all.length, {
      message: 'Each address may stand once',
    })
    .describe('To whom the issued report is sent'),
  revisionReason: z.string().trim().max(2000).describe('Why a new revision is made; of no use for the first'),
};

/** A report speaks of at least one verdict or one study. */
export const createReportSchema = z.object({
  title: fields.title,
  verdictIds: fields.verdictIds.default([]),
  studyVersionIds: fields.studyVersionIds.default([]),
  summary: fields.summary.default(''),
  deviations: fields.deviations.default(''),
  recipients: fields.recipients.default([]),
});
export type CreateReport = z.infer<typeof createReportSchema>;

export const updateReportSchema = z.object(fields).partial();
export type UpdateReport = z.infer<typeof updateReportSchema>;

const comment = z.string().trim().max(2000);

/** Comment that goes with a step; needed when a report is returned. */
export const reportStepSchema = z.object({ comment: comment.default('') });
export type ReportStep = z.infer<typeof reportStepSchema>;
export const submitReportSchema = reportStepSchema.extend({
  revisionReason: fields.revisionReason.optional().describe('Needed for a new revision that has none yet'),
});
export type SubmitReport = z.infer<typeof submitReportSchema>;
export const returnReportSchema = z.object({ comment: comment.min(1, 'Say what must be mended') });
export const issueReportSchema = reportStepSchema.extend({
  overdueReason: z
    .string()
    .trim()
    .min(20, 'Say in at least 20 characters why the results stand in spite of it')
    .max(2000)
    .optional()
    .describe('Needed where calibration was overdue or missing: why the results stand; it is printed'),
});
export type IssueReport = z.infer<typeof issueReportSchema>;
export const commentReportSchema = z.object({ comment: comment.min(1, 'Write a comment') });

export const reportEventSchema = z.object({
  kind: z.enum([
    'created',
    'changed',
    'submitted',
    'withdrawn',
    'returned',
    'issued',
    'superseded',
    'commented',
  ]),
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
    preparerMayIssue: z.boolean().describe('Whether one person may prepare and issue a report'),
  }),
  revisionReason: z.string().nullable().describe('Why this revision was made; null for the first'),
  laboratory: laboratorySchema,
  sections: z.array(reportSectionSchema),
  studies: z.array(reportStudySchema),
  result: verdictResultSchema.describe('The worst of the verdicts'),
});
export type ReportContent = z.infer<typeof reportContentSchema>;

const revisionRefSchema = z.object({
  id: idSchema,
  revision: z.number().int(),
  status: reportStatusSchema,
});
export type RevisionRef = z.infer<typeof revisionRefSchema>;

/** What who issues a report should know of it; `section` counts from 0. */
export const reportCautionSchema = z.object({
  code: z.enum(['verdict-outdated', 'chain-not-named', 'calibration-overdue']),
  section: z.number().int(),
  message: z.string().describe('What is the matter, and the cure'),
});
export type ReportCaution = z.infer<typeof reportCautionSchema>;

export const reportSchema = z.object({
  id: idSchema,
  projectId: idSchema,
  number: z.string().nullable().describe('Given when first issued: HR-0001; revisions keep it'),
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
  revisionReason: z.string().nullable().describe('Why this revision is made; null for the first'),
  status: reportStatusSchema,
  returned: z
    .object({ by: personRefSchema, at: timestampSchema, comment: z.string() })
    .nullable()
    .describe('What must be mended: a draft that came back from review; null for any other'),
  verdictIds: z.array(idSchema),
  studyVersionIds: z.array(idSchema),
  content: reportContentSchema.describe('Live for a draft, frozen while in review and once issued'),
  cautions: z.array(reportCautionSchema),
  events: z.array(reportEventSchema),
  preparedBy: personRefSchema,
  submittedBy: personRefSchema.nullable().describe('Who submitted it last'),
  issuedBy: personRefSchema.nullable(),
  issuedAt: timestampSchema.nullable(),
  isIssuedByPreparer: z.boolean().describe('Prepared and issued by the same person, as the project allowed'),
  pdfSha256: z.string().nullable(),
  jsonSha256: z.string().nullable(),
  csvSha256: z.string().nullable(),
  checkCode: z.string().nullable().describe('With the number it opens the public check page'),
  checkUrl: z.string().nullable().describe('Address of the public check page of this revision'),
  createdAt: timestampSchema,
  updatedAt: timestampSchema,
});
export type Report = z.infer<typeof reportSchema>;

export const reportListItemSchema = reportSchema
  .omit({
    content: true,
    events: true,
    cautions: true,
    verdictIds: true,
    studyVersionIds: true,
    recipients: true,
  })
  .extend({ result: verdictResultSchema, sections: z.number().int() });
export type ReportListItem = z.infer<typeof reportListItemSchema>;
export const reportPageSchema = pageOf(reportListItemSchema);

/** Path of the public check page of an issued report, as its PDF and its QR code name it. */
export const reportCheckPath = (number: string, code: string): string =>
  `/check/${encodeURIComponent(number)}/${encodeURIComponent(code)}`;

/** What the public check page tells of an issued revision, and nothing else. */
export const reportCheckSchema = z.object({
  number: z.string(),
  revision: z.number().int(),
  issuedAt: timestampSchema,
  state: z.enum(['current', 'superseded']),
  newest: z
    .object({ revision: z.number().int(), issuedAt: timestampSchema })
    .nullable()
    .describe('The revision that is current now; null where this one is'),
  pdfSha256: z.string().describe('SHA-256 of the PDF that was issued, in hexadecimal'),
});
export type ReportCheck = z.infer<typeof reportCheckSchema>;
