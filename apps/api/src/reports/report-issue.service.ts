import { Inject, Injectable } from '@nestjs/common';
import type { IssueReport, Report } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { Storage } from '../storage/storage.js';
import { newCheckCode } from './check-code.js';
import { ReportRendering } from './rendering/report-rendering.service.js';
import type { RenderedForms } from './rendering/report-task.js';
import { ReportNotices } from './report-notices.service.js';
import { reportNumber } from './report-number.js';
import { referencesOf } from './report-references.js';
import { requireAction } from './report-state.js';
import { isPreparer } from './report-view.js';
import { ReportsRepository, type LockedReport } from './reports.repository.js';
import { ReportsService } from './reports.service.js';

/** The last step: a report as reviewed gets its number, its check code and its files, and is frozen. */
@Injectable()
export class ReportIssueService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ReportsRepository,
    private readonly reports: ReportsService,
    private readonly storage: Storage,
    private readonly rendering: ReportRendering,
    private readonly notices: ReportNotices,
  ) {}

  /**
   * Issues the report; a revision that it replaces is superseded with it.
   *
   * A number whose transaction fails is given out again, so that numbers have no gaps. The counter of the project is
   * held while a number is taken until the commit, and recordings wait for it; so the files are drawn before, with
   * the number that comes next, and are drawn again under the lock only when another report took it meanwhile. They
   * are stored before the commit, so that an issued report always has them.
   * @throws 403 for who prepared it, unless the project allows that; 409 when calibration was overdue and nobody
   * says why the results stand, when it is not in review, or when a verdict is outdated
   */
  async issue(user: SignedInUser, id: string, { comment, overdueReason }: IssueReport): Promise<Report> {
    const reviewed = await this.reports.get(id);
    requireAction(reviewed.status, 'issue');
    const { preparerMayIssue, ...preparers } = await this.reports.preparers(id);
    const isSame = isPreparer(preparers, user.id);
    if (isSame && !preparerMayIssue) throw ownReport();
    const stated = requireCalibrated(reviewed, overdueReason);

    const toIssue: Report = {
      ...reviewed,
      status: 'issued',
      content: { ...reviewed.content, project: { ...reviewed.content.project, preparerMayIssue } },
      overdueReason: stated,
      issuedBy: { id: user.id, name: user.name },
      isIssuedByPreparer: isSame,
      checkCode: newCheckCode(),
    };
    const ahead = reviewed.number ?? reportNumber(await this.repository.numberAhead(reviewed.projectId));
    const early = await this.draw(toIssue, ahead);
    await this.database.transaction(async (tx) => {
      const row = await this.reports.lockAsRead(tx, reviewed, 'issue');
      const number = row.number ?? (await this.repository.nextNumber(tx, row.projectId));
      const issued = reportNumber(number) === ahead ? early : await this.draw(toIssue, reportNumber(number));
      const files = await this.keep(row, issued.forms);
      const { issuedAt } = issued;
      const words = eventWords(comment, isSame, stated);
      await this.repository.addEvent(tx, {
        ...{ reportId: id, byId: user.id, kind: 'issued', comment: words, at: issuedAt },
      });
      await this.repository.addReferences(tx, id, referencesOf(toIssue.content));
      await this.repository.update(tx, id, {
        ...{ number, issuedAt, ...files, status: 'issued', content: toIssue.content },
        ...{ issuedById: user.id, overdueReason: stated, checkCode: toIssue.checkCode, updatedAt: issuedAt },
      });
      if (row.replacesId !== null) await this.supersede(tx, user, row.replacesId, row.revision);
      await this.notices.issued(tx, id, user);
    });
    return this.reports.get(id);
  }

  private async draw(report: Report, number: string) {
    const issuedAt = new Date();
    const forms = await this.rendering.render({ ...report, number, issuedAt: issuedAt.toISOString() });
    return { issuedAt, forms };
  }

  /** Stores the files under names that nobody reads before the commit. */
  private async keep({ id, revision }: LockedReport, { pdf, json, csv }: RenderedForms) {
    const name = `reports/${id}/revision-${revision}`;
    const [ofPdf, ofJson, ofCsv] = await Promise.all([
      this.storage.put(`${name}.pdf`, pdf),
      this.storage.put(`${name}.json`, json),
      this.storage.put(`${name}.csv`, csv),
    ]);
    return {
      ...{ pdfKey: `${name}.pdf`, pdfSha256: ofPdf.sha256 },
      ...{ jsonKey: `${name}.json`, jsonSha256: ofJson.sha256 },
      ...{ csvKey: `${name}.csv`, csvSha256: ofCsv.sha256 },
    };
  }

  private async supersede(tx: Tx, user: SignedInUser, id: string, by: number): Promise<void> {
    await this.repository.lock(tx, id);
    await this.repository.update(tx, id, { status: 'superseded' });
    const comment = `Replaced by revision ${by}`;
    await this.repository.addEvent(tx, { reportId: id, byId: user.id, kind: 'superseded', comment });
  }
}

function ownReport() {
  const detail =
    'You prepared or submitted this report, so another manager issues it; the project settings can allow one person to do both';
  return problem(403, 'preparer-may-not-issue', detail);
}

/**
 * Refuses a report whose instruments were out of calibration when it was measured, unless the reason is given.
 * @returns the reason to keep; null where nothing was overdue
 */
function requireCalibrated({ cautions }: Report, reason: string | undefined): string | null {
  const overdue = cautions.filter(({ code }) => code === 'calibration-overdue');
  if (overdue.length === 0) return null;
  if (reason) return reason;
  const named = [...new Set(overdue.map(({ message }) => message))];
  const cure =
    'Put the calibration on record if there was one and return the report, or state why the results stand in spite of it';
  const errors = named.map((message) => ({ path: 'overdueReason', message }));
  throw problem(409, 'calibration-overdue', `${named.join('. ')}. ${cure}`, errors);
}

/** What the log keeps of an issue beside the comment. */
function eventWords(comment: string, isSame: boolean, overdueReason: string | null): string {
  const same = isSame ? 'Prepared and issued by the same person, as the project allows.' : '';
  const overdue = overdueReason ? `Issued although calibration was overdue: ${overdueReason}` : '';
  return [comment, same, overdue].filter(Boolean).join('\n');
}
