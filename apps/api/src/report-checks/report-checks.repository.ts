import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database } from '@overtally/db';
import { and, desc, eq, inArray } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { reports } = schema;
const frozen = inArray(reports.status, ['issued', 'superseded']);

@Injectable()
export class ReportChecksRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** The issued revision that the code was given to, if it is one of that number. */
  async find(number: number, code: string) {
    const [row] = await this.database
      .select({
        projectId: reports.projectId,
        revision: reports.revision,
        status: reports.status,
        issuedAt: reports.issuedAt,
        pdfSha256: reports.pdfSha256,
      })
      .from(reports)
      .where(and(eq(reports.checkCode, code), eq(reports.number, number), frozen));
    return row;
  }

  /** The last issued revision under a number of a project. */
  async newest(projectId: string, number: number) {
    const [row] = await this.database
      .select({ revision: reports.revision, issuedAt: reports.issuedAt })
      .from(reports)
      .where(and(eq(reports.projectId, projectId), eq(reports.number, number), frozen))
      .orderBy(desc(reports.revision))
      .limit(1);
    return row;
  }
}
