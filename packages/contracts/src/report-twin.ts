import { z } from 'zod';
import { reportSchema } from './reports.js';

/** Name of the form of the machine-readable twin; a change that a reader must know of raises `formatVersion`. */
export const reportTwinFormat = 'overtally-report';
export const reportTwinVersion = 1;

/**
 * A report as data: what its PDF says, with every figure in full. Figures are in the units that their names or the
 * `unit` beside them state; null is what does not apply or is not known.
 */
export const reportTwinSchema = z.object({
  format: z.literal(reportTwinFormat),
  formatVersion: z.literal(reportTwinVersion),
  ...reportSchema.pick({
    id: true,
    number: true,
    revision: true,
    status: true,
    title: true,
    summary: true,
    deviations: true,
    overdueReason: true,
    preparedBy: true,
    issuedBy: true,
    issuedAt: true,
    checkCode: true,
  }).shape,
  checkUrl: z.string().nullable().describe('Page that tells whether this report is the one that was issued'),
  replacesRevision: z.number().int().nullable().describe('The revision that this one replaces'),
  events: reportSchema.shape.events,
  content: reportSchema.shape.content,
});
export type ReportTwin = z.infer<typeof reportTwinSchema>;
