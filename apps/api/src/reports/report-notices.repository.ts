import { Injectable } from '@nestjs/common';
import { schema, type Tx } from '@overtally/db';
import { and, desc, eq, inArray, isNull, ne } from 'drizzle-orm';

const { members, projects, reportEvents, reports, users } = schema;

export type NoticedReport = Awaited<ReturnType<ReportNoticesRepository['find']>>;

/** A person as a message is addressed. */
interface Addressee {
  name: string;
  email: string;
}

const addressee = { name: users.name, email: users.email };

/** What messages about a report need to know: the report in short, and whom it concerns. */
@Injectable()
export class ReportNoticesRepository {
  async find(tx: Tx, id: string) {
    const { projectId, number, revision, title, status, recipients, replacesId } = reports;
    const { pdfKey, pdfSha256, checkCode, preparedById } = reports;
    const [row] = await tx
      .select({
        ...{ id: reports.id, projectId, number, revision, title, status, recipients, replacesId },
        ...{ pdfKey, pdfSha256, checkCode, preparedById },
        projectName: projects.name,
        customer: projects.customer,
        preparerMayIssue: projects.preparerMayIssue,
      })
      .from(reports)
      .innerJoin(projects, eq(projects.id, reports.projectId))
      .where(eq(reports.id, id));
    if (!row) throw new Error(`Report ${id} has gone`);
    return row;
  }

  /** The managers who may issue the report, but for who submitted it. */
  reviewers(tx: Tx, report: NoticedReport, submitterId: string): Promise<Addressee[]> {
    return tx
      .select(addressee)
      .from(members)
      .innerJoin(users, eq(users.id, members.userId))
      .where(
        and(
          eq(members.projectId, report.projectId),
          eq(members.role, 'manager'),
          isNull(users.disabledAt),
          ne(users.id, submitterId),
          report.preparerMayIssue ? undefined : ne(users.id, report.preparedById),
        ),
      );
  }

  /** Who prepared and who last submitted the report, but for `exceptId`. */
  async authors(tx: Tx, { id, preparedById }: NoticedReport, exceptId: string): Promise<Addressee[]> {
    const [submitted] = await tx
      .select({ byId: reportEvents.byId })
      .from(reportEvents)
      .where(and(eq(reportEvents.reportId, id), eq(reportEvents.kind, 'submitted')))
      .orderBy(desc(reportEvents.at))
      .limit(1);
    const ids = [preparedById, submitted?.byId ?? preparedById];
    return tx
      .select(addressee)
      .from(users)
      .where(and(inArray(users.id, ids), ne(users.id, exceptId), isNull(users.disabledAt)));
  }
}
