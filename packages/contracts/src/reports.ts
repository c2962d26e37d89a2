import { z } from 'zod';
import { analysisSchema, channelAnalysisSchema, noteSchema, settingsSchema } from './analyses.js';
import { idSchema, pageOf, personRefSchema, timestampSchema } from './common.js';
import { verdictResultSchema, verdictSchema } from './limits.js';
import { recordingSchema } from './recordings.js';

export const reportStatusSchema = z.enum(['draft', 'in-review', 'issued', 'superseded']);
export type ReportStatus = z.infer<typeof reportStatusSchema>;

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
});
export type ReportSection = z.infer<typeof reportSectionSchema>;

/** Everything a report says, frozen from submission on, so that what was reviewed is what is issued. */
export const reportContentSchema = z.object({
  project: z.object({ id: idSchema, name: z.string(), customer: z.string() }),
  sections: z.array(reportSectionSchema),
  result: verdictResultSchema.describe('The worst of the verdicts'),
});
export type ReportContent = z.infer<typeof reportContentSchema>;

export const reportSchema = z.object({
  id: idSchema,
  projectId: idSchema,
  number: z.string().nullable().describe('Given when issued: HR-0001'),
  revision: z.number().int(),
  title: z.string(),
  summary: z.string(),
  status: reportStatusSchema,
  verdictIds: z.array(idSchema),
  content: reportContentSchema.describe('Live for a draft, frozen while in review and once issued'),
  events: z.array(reportEventSchema),
  preparedBy: personRefSchema,
  issuedBy: personRefSchema.nullable(),
  issuedAt: timestampSchema.nullable(),
  pdfSha256: z.string().nullable(),
  createdAt: timestampSchema,
  updatedAt: timestampSchema,
});
export type Report = z.infer<typeof reportSchema>;

export const reportListItemSchema = reportSchema
  .omit({ content: true, events: true, verdictIds: true })
  .extend({ result: verdictResultSchema, sections: z.number().int() });
export type ReportListItem = z.infer<typeof reportListItemSchema>;
export const reportPageSchema = pageOf(reportListItemSchema);
