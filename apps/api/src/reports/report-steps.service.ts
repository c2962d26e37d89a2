import { Inject, Injectable } from '@nestjs/common';
import type { Report, ReportEvent, SubmitReport } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { ReportNotices } from './report-notices.service.js';
import { requireAction, type ReportAction } from './report-state.js';
import { isPreparer } from './report-view.js';
import { ReportsRepository } from './reports.repository.js';
import { ReportsService } from './reports.service.js';

/** The way of a report from draft into review and back; what is said of it on the way. */
@Injectable()
export class ReportStepsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ReportsRepository,
    private readonly reports: ReportsService,
    private readonly notices: ReportNotices,
  ) {}

  /**
   * Into review, with what it says kept, so that what is reviewed is what will be issued.
   * @throws 422 for a new revision that nobody says the reason of
   */
  async submit(user: SignedInUser, id: string, { comment, ...input }: SubmitReport): Promise<Report> {
    const draft = await this.reports.get(id);
    requireAction(draft.status, 'submit');
    const revisionReason = draft.replaces ? input.revisionReason || draft.revisionReason : null;
    if (draft.replaces && !revisionReason) {
      const message = 'Say why the report is revised; the new revision prints it';
      throw problem(422, 'revision-reason-missing', message, [{ path: 'revisionReason', message }]);
    }
    const content = { ...draft.content, revisionReason };
    await this.database.transaction(async (tx) => {
      await this.reports.lockAsRead(tx, draft, 'submit');
      await this.repository.update(tx, id, { status: 'in-review', content, revisionReason });
      await this.repository.addEvent(tx, { reportId: id, byId: user.id, kind: 'submitted', comment });
      await this.notices.reviewRequested(tx, id, user, comment);
    });
    return this.reports.get(id);
  }

  /** Back to the author as a draft, with what must be mended. */
  async return(user: SignedInUser, id: string, comment: string): Promise<Report> {
    return this.backToDraft(user, id, { action: 'return', kind: 'returned', comment });
  }

  /**
   * Out of review as a draft again, by who brought it there.
   * @throws 403 for anybody but who prepared or submitted it
   */
  async withdraw(user: SignedInUser, id: string, comment: string): Promise<Report> {
    if (!isPreparer(await this.reports.preparers(id), user.id)) {
      const detail = 'Who prepared or submitted the report withdraws it; a manager can return it instead';
      throw problem(403, 'not-the-preparer', detail);
    }
    return this.backToDraft(user, id, { action: 'withdraw', kind: 'withdrawn', comment });
  }

  /** Puts words beside a report in whatever state; they change nothing of it. */
  async comment(user: SignedInUser, id: string, comment: string): Promise<Report> {
    await this.database.transaction((tx) =>
      this.repository.addEvent(tx, { reportId: id, byId: user.id, kind: 'commented', comment }),
    );
    return this.reports.get(id);
  }

  private async backToDraft(
    user: SignedInUser,
    id: string,
    step: { action: ReportAction; kind: ReportEvent['kind']; comment: string },
  ): Promise<Report> {
    const { action, ...event } = step;
    await this.database.transaction(async (tx) => {
      await this.reports.lockFor(tx, id, action);
      await this.repository.update(tx, id, { status: 'draft', content: null });
      await this.repository.addEvent(tx, { reportId: id, byId: user.id, ...event });
      if (event.kind === 'returned') await this.notices.returned(tx, id, user, event.comment);
    });
    return this.reports.get(id);
  }
}
