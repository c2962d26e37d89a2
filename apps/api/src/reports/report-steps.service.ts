import { Inject, Injectable } from '@nestjs/common';
import type { Report } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { Storage } from '../storage/storage.js';
import { ReportRendering } from './rendering/report-rendering.service.js';
import { requireAction } from './report-state.js';
import { reportNumber } from './report-view.js';
import { ReportsRepository } from './reports.repository.js';
import { ReportsService } from './reports.service.js';

/** The way of a report from draft through review to issue. */
@Injectable()
export class ReportStepsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ReportsRepository,
    private readonly reports: ReportsService,
    private readonly storage: Storage,
    private readonly rendering: ReportRendering,
  ) {}

  /** Into review, with what it says kept, so that what is reviewed is what will be issued. */
  async submit(user: SignedInUser, id: string, comment: string): Promise<Report> {
    const draft = await this.reports.get(id);
    requireAction(draft.status, 'submit');
    await this.database.transaction(async (tx) => {
      await this.reports.lockAsRead(tx, draft, 'submit');
      await this.repository.update(tx, id, { status: 'in-review', content: draft.content });
      await this.repository.addEvent(tx, { reportId: id, byId: user.id, kind: 'submitted', comment });
    });
    return this.reports.get(id);
  }

  /** Back to the author as a draft, with what must be mended. */
  async return(user: SignedInUser, id: string, comment: string): Promise<Report> {
    await this.database.transaction(async (tx) => {
      await this.reports.lockFor(tx, id, 'return');
      await this.repository.update(tx, id, { status: 'draft', content: null });
      await this.repository.addEvent(tx, { reportId: id, byId: user.id, kind: 'returned', comment });
    });
    return this.reports.get(id);
  }

  /**
   * Gives the report as reviewed its number and keeps its PDF with the SHA-256.
   *
   * The PDF is stored before the commit, so that an issued report always has one; a number whose transaction
   * fails is given out again, so that numbers have no gaps.
   */
  async issue(user: SignedInUser, id: string, comment: string): Promise<Report> {
    const reviewed = await this.reports.get(id);
    requireAction(reviewed.status, 'issue');
    await this.database.transaction(async (tx) => {
      const row = await this.reports.lockAsRead(tx, reviewed, 'issue');
      const number = await this.repository.nextNumber(tx, row.projectId);
      const issuedAt = new Date();
      const { pdf } = await this.rendering.forms(
        {
          ...reviewed,
          number: reportNumber(number),
          status: 'issued',
          issuedBy: { id: user.id, name: user.name },
          issuedAt: issuedAt.toISOString(),
        },
        ['pdf'],
      );
      const pdfKey = `reports/${id}/revision-${row.revision}.pdf`;
      const { sha256: pdfSha256 } = await this.storage.put(pdfKey, pdf);
      await this.repository.addEvent(tx, { reportId: id, byId: user.id, kind: 'issued', comment });
      await this.repository.update(tx, id, {
        ...{ number, issuedAt, pdfKey, pdfSha256, status: 'issued' },
        ...{ content: reviewed.content, issuedById: user.id, updatedAt: issuedAt },
      });
    });
    return this.reports.get(id);
  }
}
