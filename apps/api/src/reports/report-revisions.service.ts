import { Inject, Injectable } from '@nestjs/common';
import type { Report } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { reportNumber } from './report-number.js';
import { ReportsRepository } from './reports.repository.js';
import { ReportsService } from './reports.service.js';

/** New revisions of issued reports. */
@Injectable()
export class ReportRevisionsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ReportsRepository,
    private readonly reports: ReportsService,
  ) {}

  /**
   * Makes a draft with the same number and the next revision that says at first what the issued one says. The
   * issued one stays current until the draft is issued; while there is one, no other can be made.
   * @throws 409 for a report that is not issued, or that a revision is under way for
   */
  async revise(user: SignedInUser, id: string): Promise<Report> {
    const { replacedBy, verdictIds, studyVersionIds } = await this.reports.get(id);
    const made = await this.database.transaction(async (tx) => {
      const row = await this.reports.lockFor(tx, id, 'revise');
      if (replacedBy || (await this.repository.isReplaced(tx, id))) throw revisionUnderWay(row.revision + 1);
      const { projectId, number, title, summary, deviations, recipients } = row;
      const revision = row.revision + 1;
      const draft = await this.repository.insert(tx, {
        ...{ projectId, number, title, summary, deviations, recipients },
        ...{ revision, replacesId: id, preparedById: user.id },
      });
      await this.repository.setVerdicts(tx, draft, verdictIds);
      await this.repository.setStudies(tx, draft, studyVersionIds);
      const comment = `Revision ${revision} of ${reportNumber(number ?? 0)}`;
      await this.repository.addEvent(tx, { reportId: draft, byId: user.id, kind: 'created', comment });
      return draft;
    });
    return this.reports.get(made);
  }
}

function revisionUnderWay(revision: number) {
  const detail = `Revision ${revision} is under way; issue or delete it first`;
  return problem(409, 'revision-under-way', detail);
}
