import { Inject, Injectable } from '@nestjs/common';
import type {
  CreateReport,
  ProjectRole,
  Report,
  ReportContent,
  ReportStatus,
  UpdateReport,
} from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { AppConfig } from '../config/app-config.js';
import { DATABASE } from '../database/database.tokens.js';
import { VerdictsService } from '../limits/verdicts.service.js';
import { ReportedStudies } from '../studies/reported-studies.service.js';
import { completedContent } from './completed-content.js';
import { cautionsOf } from './report-cautions.js';
import { ReportContentService } from './report-content.service.js';
import { requireAction, visibleStatuses, type ReportAction } from './report-state.js';
import { asSeenBy, toListItem, toReport } from './report-view.js';
import { ReportsRepository, type LockedReport, type ReportRow } from './reports.repository.js';

const placeSchema = z.tuple([z.iso.datetime(), z.uuid()]);

interface ReportQuery {
  status?: ReportStatus;
  cursor?: string;
  limit: number;
}

/** Reports as drafts: making, reading, changing and deleting them. */
@Injectable()
export class ReportsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: ReportsRepository,
    private readonly verdicts: VerdictsService,
    private readonly contents: ReportContentService,
    private readonly studies: ReportedStudies,
    private readonly config: AppConfig,
  ) {}

  /** A report with its content: live for a draft, as frozen by submission for any other. */
  async get(id: string): Promise<Report> {
    const [row, events] = await Promise.all([this.repository.find(id), this.repository.eventsOf(id)]);
    if (!row) throw noSuchReport();
    const content = row.content ? completedContent(row.content) : await this.gather(row);
    const isOpen = row.status === 'draft' || row.status === 'in-review';
    const outdated = isOpen ? await this.verdicts.outdated(row.verdictIds) : [];
    const cautions = cautionsOf(content, outdated);
    return toReport(row, { content, cautions, events }, this.config.publicUrl);
  }

  /**
   * The report as a person of this role sees it.
   * @throws 404 when there is no such report for a person of this role
   */
  async getFor(role: ProjectRole | null, id: string): Promise<Report> {
    await this.requireVisible(id, role);
    return asSeenBy(role, await this.get(id));
  }

  /** @throws 404 when there is no such report for a person of this role */
  async requireVisible(id: string, role: ProjectRole | null): Promise<void> {
    const status = await this.repository.statusOf(id);
    if (!status || !visibleStatuses(role).includes(status)) throw noSuchReport();
  }

  /** Who prepared and who last submitted a report, and whether they may issue it by the rule of the project. */
  async preparers(id: string) {
    const row = await this.repository.preparers(id);
    if (!row) throw noSuchReport();
    return row;
  }

  /** Reports of a project that a person of this role sees, the newest first. */
  async list(projectId: string, role: ProjectRole | null, { status, cursor, limit }: ReportQuery) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { createdAt: place[0], id: place[1] };
    const statuses = visibleStatuses(role).filter((visible) => status === undefined || visible === status);
    const rows = await this.repository.list(projectId, statuses, after, limit + 1);
    return pageOfRows(
      rows,
      limit,
      (row) => [row.createdAt.toISOString(), row.id],
      (row) => asSeenBy(role, toListItem(row, this.config.publicUrl)),
    );
  }

  async create(user: SignedInUser, projectId: string, input: CreateReport): Promise<Report> {
    const { verdictIds, studyVersionIds, ...words } = input;
    await this.requireVerdicts(projectId, verdictIds);
    await this.studies.require(projectId, studyVersionIds);
    if (verdictIds.length + studyVersionIds.length === 0) throw nothingToReport();
    const id = await this.database.transaction(async (tx) => {
      await this.verdicts.requireCurrent(tx, verdictIds);
      const made = await this.repository.insert(tx, { ...words, projectId, preparedById: user.id });
      await this.repository.setVerdicts(tx, made, verdictIds);
      await this.repository.setStudies(tx, made, studyVersionIds);
      await this.repository.addEvent(tx, { reportId: made, byId: user.id, kind: 'created' });
      return made;
    });
    return this.get(id);
  }

  async update(user: SignedInUser, projectId: string, id: string, input: UpdateReport): Promise<Report> {
    const { verdictIds, studyVersionIds, ...words } = input;
    if (verdictIds) await this.requireVerdicts(projectId, verdictIds);
    if (studyVersionIds) await this.studies.require(projectId, studyVersionIds);
    await this.database.transaction(async (tx) => {
      await this.lockFor(tx, id, 'change');
      if (verdictIds) {
        await this.verdicts.requireCurrent(tx, verdictIds);
        await this.repository.setVerdicts(tx, id, verdictIds);
      }
      if (studyVersionIds) await this.repository.setStudies(tx, id, studyVersionIds);
      if ((await this.repository.subjects(tx, id)) === 0) throw nothingToReport();
      await this.repository.update(tx, id, words);
      await this.repository.addEvent(tx, { reportId: id, byId: user.id, kind: 'changed' });
    });
    return this.get(id);
  }

  async delete(id: string): Promise<void> {
    await this.database.transaction(async (tx) => {
      await this.lockFor(tx, id, 'delete');
      await this.repository.delete(tx, id);
    });
  }

  /**
   * Holds a report as it was read for a step towards its issue.
   * @throws 409 when its state does not allow the step, it was changed since, or a verdict is outdated
   */
  async lockAsRead(tx: Tx, read: Report, action: ReportAction): Promise<LockedReport> {
    const row = await this.lockFor(tx, read.id, action);
    if (row.updatedAt.toISOString() !== read.updatedAt) {
      const detail = `The report was changed just now; read it again, then ${action} it`;
      throw problem(409, 'changed-meanwhile', detail);
    }
    await this.verdicts.requireCurrent(tx, read.verdictIds);
    return row;
  }

  /** The report's row, held for an action that its state allows. */
  async lockFor(tx: Tx, id: string, action: ReportAction): Promise<LockedReport> {
    const row = await this.repository.lock(tx, id);
    if (!row) throw noSuchReport();
    requireAction(row.status, action);
    return row;
  }

  private gather(row: ReportRow): Promise<ReportContent> {
    const { projectId, projectName, customer, customerContact, preparerMayIssue, revisionReason } = row;
    const project = { id: projectId, name: projectName, customer, customerContact, preparerMayIssue };
    return this.contents.gather({ project, revisionReason }, row.verdictIds, row.studyVersionIds);
  }

  private async requireVerdicts(projectId: string, ids: readonly string[]): Promise<void> {
    const found = await this.verdicts.ofProject(projectId, ids);
    const errors = found.flatMap((verdict, index) =>
      verdict ? [] : [{ path: `verdictIds.${index}`, message: 'The project has no such verdict' }],
    );
    if (errors.length === 0) return;
    throw problem(
      422,
      'verdict-unknown',
      'A report speaks of verdicts of its own project; see errors',
      errors,
    );
  }
}

function nothingToReport() {
  const message = 'Choose at least one verdict or one study';
  return problem(422, 'nothing-to-report', message, [{ path: 'verdictIds', message }]);
}

const noSuchReport = () => problem(404, 'not-found', 'There is no such report');
