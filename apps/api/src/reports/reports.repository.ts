import { Inject, Injectable } from '@nestjs/common';
import type { PersonRef, ReportEvent, ReportStatus, RevisionRef, VerdictResult } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, desc, eq, getTableColumns, inArray, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { DATABASE } from '../database/database.tokens.js';

const { projects, reportEvents, reportReferences, reports, reportStudies, reportVerdicts, users, verdicts } =
  schema;

type ReportReferenceKind = (typeof reportReferences.$inferInsert)['kind'];

const preparers = alias(users, 'preparers');
const issuers = alias(users, 'issuers');

const { content: _content, ...headColumns } = getTableColumns(reports);
const joined = {
  preparerName: preparers.name,
  issuerName: issuers.name,
  projectName: projects.name,
  customer: projects.customer,
  customerContact: projects.customerContact,
  preparerMayIssue: projects.preparerMayIssue,
  submittedBy: sql<PersonRef | null>`(
    select json_build_object('id', u.id, 'name', u.name) from ${reportEvents} e join ${users} u on u.id = e.by_id
    where e.report_id = ${reports.id} and e.kind = 'submitted' order by e.created_at desc limit 1)`,
  lastStep: sql<LastStep | null>`(
    select json_build_object('kind', e.kind, 'by', json_build_object('id', u.id, 'name', u.name), 'at', e.created_at,
      'comment', e.comment)
    from ${reportEvents} e join ${users} u on u.id = e.by_id
    where e.report_id = ${reports.id} and e.kind in ('submitted', 'returned', 'withdrawn')
    order by e.created_at desc limit 1)`,
  replaces: sql<RevisionRef | null>`(
    select json_build_object('id', r.id, 'revision', r.revision, 'status', r.status) from ${reports} r
    where r.id = ${reports.replacesId})`,
  replacedBy: sql<RevisionRef | null>`(
    select json_build_object('id', r.id, 'revision', r.revision, 'status', r.status) from ${reports} r
    where r.replaces_id = ${reports.id})`,
  verdictIds: sql<string[]>`coalesce((
    select json_agg(rv.verdict_id order by rv.position) from ${reportVerdicts} rv
    where rv.report_id = ${reports.id}), '[]')`,
  studyVersionIds: sql<string[]>`coalesce((
    select json_agg(rs.study_version_id order by rs.position) from ${reportStudies} rs
    where rs.report_id = ${reports.id}), '[]')`,
  results: sql<VerdictResult[]>`coalesce((
    select json_agg(v.result order by rv.position) from ${reportVerdicts} rv
    join ${verdicts} v on v.id = rv.verdict_id where rv.report_id = ${reports.id}), '[]')`,
};

/** What last moved a report into review or out of it. */
type LastStep = Pick<ReportEvent, 'by' | 'at' | 'comment'> & { kind: 'submitted' | 'returned' | 'withdrawn' };

export type LockedReport = typeof reports.$inferSelect;
export type ReportRow = NonNullable<Awaited<ReturnType<ReportsRepository['find']>>>;
export type ReportEventRow = Awaited<ReturnType<ReportsRepository['eventsOf']>>[number];

/** Reports, the verdicts they speak of and what was done with them. */
@Injectable()
export class ReportsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  async find(id: string) {
    const [row] = await this.database
      .select({ ...headColumns, content: reports.content, ...joined })
      .from(reports)
      .innerJoin(projects, eq(projects.id, reports.projectId))
      .innerJoin(preparers, eq(preparers.id, reports.preparedById))
      .leftJoin(issuers, eq(issuers.id, reports.issuedById))
      .where(eq(reports.id, id));
    return row;
  }

  /** Who had the report in hand before its review, and whether that person may issue it. */
  async preparers(id: string) {
    const { preparerMayIssue, submittedBy } = joined;
    const [row] = await this.database
      .select({ preparedById: reports.preparedById, submittedBy, preparerMayIssue })
      .from(reports)
      .innerJoin(projects, eq(projects.id, reports.projectId))
      .where(eq(reports.id, id));
    return row;
  }

  async statusOf(id: string): Promise<ReportStatus | undefined> {
    const [row] = await this.database
      .select({ status: reports.status })
      .from(reports)
      .where(eq(reports.id, id));
    return row?.status;
  }

  /** The newest first, from behind `after`, without contents. */
  async list(
    projectId: string,
    statuses: readonly ReportStatus[],
    after: { createdAt: string; id: string } | undefined,
    limit: number,
  ) {
    const behind =
      after &&
      sql`(${reports.createdAt}, ${reports.id}) < (${after.createdAt}::timestamptz, ${after.id}::uuid)`;
    return this.database
      .select({ ...headColumns, ...joined })
      .from(reports)
      .innerJoin(projects, eq(projects.id, reports.projectId))
      .innerJoin(preparers, eq(preparers.id, reports.preparedById))
      .leftJoin(issuers, eq(issuers.id, reports.issuedById))
      .where(and(eq(reports.projectId, projectId), inArray(reports.status, statuses), behind))
      .orderBy(desc(reports.createdAt), desc(reports.id))
      .limit(limit);
  }

  async eventsOf(reportId: string) {
    const { kind, byId, at, comment } = reportEvents;
    return this.database
      .select({ kind, byId, at, comment, byName: users.name })
      .from(reportEvents)
      .innerJoin(users, eq(users.id, reportEvents.byId))
      .where(eq(reportEvents.reportId, reportId))
      .orderBy(asc(reportEvents.at), asc(reportEvents.id));
  }

  /** The report, held until the transaction ends; every step goes through this lock. */
  async lock(tx: Tx, id: string): Promise<LockedReport | undefined> {
    const [row] = await tx.select().from(reports).where(eq(reports.id, id)).for('update');
    return row;
  }

  /** Whether there is a revision that replaces the report, or will. */
  async isReplaced(tx: Tx, id: string): Promise<boolean> {
    return (await tx.$count(reports, eq(reports.replacesId, id))) > 0;
  }

  async insert(tx: Tx, row: typeof reports.$inferInsert): Promise<string> {
    const [made] = await tx.insert(reports).values(row).returning({ id: reports.id });
    return made!.id;
  }

  async update(tx: Tx, id: string, change: Partial<LockedReport>): Promise<void> {
    await tx
      .update(reports)
      .set({ updatedAt: new Date(), ...change })
      .where(eq(reports.id, id));
  }

  async setVerdicts(tx: Tx, reportId: string, verdictIds: readonly string[]): Promise<void> {
    await tx.delete(reportVerdicts).where(eq(reportVerdicts.reportId, reportId));
    if (verdictIds.length === 0) return;
    await tx
      .insert(reportVerdicts)
      .values(verdictIds.map((verdictId, position) => ({ reportId, verdictId, position })));
  }

  async setStudies(tx: Tx, reportId: string, versionIds: readonly string[]): Promise<void> {
    await tx.delete(reportStudies).where(eq(reportStudies.reportId, reportId));
    if (versionIds.length === 0) return;
    await tx
      .insert(reportStudies)
      .values(versionIds.map((studyVersionId, position) => ({ reportId, studyVersionId, position })));
  }

  /** How many verdicts and studies a report speaks of. */
  async subjects(tx: Tx, reportId: string): Promise<number> {
    const [verdictCount, studyCount] = await Promise.all([
      tx.$count(reportVerdicts, eq(reportVerdicts.reportId, reportId)),
      tx.$count(reportStudies, eq(reportStudies.reportId, reportId)),
    ]);
    return verdictCount + studyCount;
  }

  async addEvent(
    tx: Tx,
    event: { reportId: string; byId: string; kind: ReportEvent['kind']; comment?: string; at?: Date },
  ): Promise<void> {
    await tx.insert(reportEvents).values(event);
  }

  async delete(tx: Tx, id: string): Promise<void> {
    await tx.delete(reports).where(eq(reports.id, id));
  }

  /** The number that the next report of a project would get, if no other takes it meanwhile. */
  async numberAhead(projectId: string): Promise<number> {
    const [counter] = await this.database
      .select({ last: projects.lastReportNumber })
      .from(projects)
      .where(eq(projects.id, projectId));
    return counter!.last + 1;
  }

  async addReferences(
    tx: Tx,
    reportId: string,
    references: readonly { targetId: string; kind: ReportReferenceKind }[],
  ): Promise<void> {
    if (references.length === 0) return;
    await tx.insert(reportReferences).values(references.map((reference) => ({ reportId, ...reference })));
  }

  /** The next report number of a project; one that is not committed is given out again. */
  async nextNumber(tx: Tx, projectId: string): Promise<number> {
    const [counter] = await tx
      .update(projects)
      .set({ lastReportNumber: sql`${projects.lastReportNumber} + 1` })
      .where(eq(projects.id, projectId))
      .returning({ number: projects.lastReportNumber });
    return counter!.number;
  }
}
