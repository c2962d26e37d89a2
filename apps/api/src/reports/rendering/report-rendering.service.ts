import { Injectable } from '@nestjs/common';
import { reportCheckPath, type Report } from '@overtally/contracts';
import { AppConfig } from '../../config/app-config.js';
import { ComputePool } from '../../jobs/compute-pool.js';
import type { RenderedForms, ReportForm, ReportTaskInput } from './report-task.js';

const never = new AbortController().signal;

/** Draws reports in a thread of their own, so that requests are answered meanwhile. */
@Injectable()
export class ReportRendering {
  constructor(
    private readonly pool: ComputePool,
    private readonly config: AppConfig,
  ) {}

  /**
   * A report as PDF and as its machine-readable twin, JSON and CSV. The same report gives the same bytes.
   *
   * To be issued, it comes with the number, status, issuer, moment and check code that it will carry.
   * @throws ComputeStopped once `stop` is raised
   */
  render(report: Report, stop: AbortSignal = never): Promise<RenderedForms> {
    return this.forms(report, ['pdf', 'json', 'csv'], stop);
  }

  /** Only the forms that are asked for; otherwise as `render`. */
  forms<Form extends ReportForm>(
    report: Report,
    forms: readonly Form[],
    stop: AbortSignal = never,
  ): Promise<RenderedForms<Form>> {
    const input: ReportTaskInput<Form> = { report, forms, checkUrl: this.checkUrl(report) };
    return this.pool.run('report', input, { stop, onProgress: () => undefined });
  }

  private checkUrl({ number, checkCode }: Report): string | null {
    if (number === null || checkCode === null) return null;
    return `${this.config.publicUrl}${reportCheckPath(number, checkCode)}`;
  }
}
