import type { Report } from '@overtally/contracts';
import { ComputeStopped, type ComputeContext } from '../../jobs/compute-task.js';
import { renderReportPdf } from '../pdf/render-report.js';
import { reportCsv } from '../twin/report-csv.js';
import { reportJson } from '../twin/report-json.js';

/** The forms in which a report is handed out; all say the same numbers. */
export type ReportForm = 'pdf' | 'json' | 'csv';

export interface ReportTaskInput<Form extends ReportForm = ReportForm> {
  report: Report;
  forms: readonly Form[];
  /** Address of the check page of this report; null until it has a number and a code. */
  checkUrl: string | null;
}

export type RenderedForms<Form extends ReportForm = ReportForm> = Record<Form, Uint8Array>;

/** Draws the forms asked for, in a compute thread. */
export async function reportTask<Form extends ReportForm>(
  { report, forms, checkUrl }: ReportTaskInput<Form>,
  { shouldStop }: Pick<ComputeContext, 'shouldStop'>,
): Promise<RenderedForms<Form>> {
  const stopWhenAsked = () => {
    if (shouldStop()) throw new ComputeStopped();
  };
  const rendered: Partial<RenderedForms> = {};
  for (const form of forms) {
    stopWhenAsked();
    rendered[form] = await render[form](report, checkUrl, stopWhenAsked);
  }
  return rendered as RenderedForms<Form>;
}

type Render = (
  report: Report,
  checkUrl: string | null,
  between: () => void,
) => Uint8Array | Promise<Uint8Array>;

const render: Record<ReportForm, Render> = {
  pdf: (report, checkUrl, between) => renderReportPdf(report, { checkUrl, between }),
  json: reportJson,
  csv: reportCsv,
};
