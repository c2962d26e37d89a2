import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { demoPeople, demoProjects, type DemoCapture, type DemoProject } from '@overtally/fixtures';
import { and, eq, inArray, sql } from 'drizzle-orm';
import { PasswordHasher } from '../auth/password-hasher.js';
import { DATABASE } from '../database/database.tokens.js';

const { members, projects, users } = schema;

/** A capture of the demonstration that is not in its project yet. */
export interface PendingCapture {
  projectId: string;
  uploadedById: string;
  capture: DemoCapture;
}

/** People and projects of the demonstration. */
@Injectable()
export class DemoAccounts {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly hasher: PasswordHasher,
  ) {}

  /** Makes them all in a database without projects; true when it did. */
  async make(): Promise<boolean> {
    if (await this.hasProjects(this.database)) return false;
    const hashes = await Promise.all(demoPeople.map(({ password }) => this.hasher.hash(password)));
    return this.database.transaction(async (tx) => {
      // Two processes that start on the same new database must not both make them.
      await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended('demonstration', 0))`);
      if (await this.hasProjects(tx)) return false;
      const idByEmail = await makePeople(tx, hashes);
      for (const project of demoProjects) await makeProject(tx, project, idByEmail);
      return true;
    });
  }

  /** What is left to upload, also after a start that was broken off. */
  async pending(): Promise<PendingCapture[]> {
    const uploader = demoPeople.find(({ role }) => role === 'technician');
    const rows = await this.database
      .select({
        id: projects.id,
        name: projects.name,
        uploaded: projects.lastRecordingNumber,
        userId: users.id,
      })
      .from(projects)
      .innerJoin(members, eq(members.projectId, projects.id))
      .innerJoin(users, eq(users.id, members.userId))
      .where(
        and(
          inArray(
            projects.name,
            demoProjects.map(({ name }) => name),
          ),
          eq(users.email, uploader?.email ?? ''),
        ),
      );
    return demoProjects.flatMap(({ name, captures }) => {
      const row = rows.find((each) => each.name === name);
      if (row === undefined) return [];
      return captures
        .slice(row.uploaded)
        .map((capture) => ({ projectId: row.id, uploadedById: row.userId, capture }));
    });
  }

  private async hasProjects(database: Database | Tx): Promise<boolean> {
    return (await database.select({ id: projects.id }).from(projects).limit(1)).length > 0;
  }
}

/** Makes the people who have no account yet; all their ids by e-mail address. */
async function makePeople(tx: Tx, hashes: string[]): Promise<Map<string, string>> {
  await tx
    .insert(users)
    .values(
      demoPeople.map(({ email, name, role }, i) => ({
        email,
        name,
        passwordHash: hashes[i]!,
        isAdministrator: role === 'administrator',
      })),
    )
    .onConflictDoNothing();
  const emails = demoPeople.map(({ email }) => email);
  const rows = await tx
    .select({ id: users.id, email: users.email })
    .from(users)
    .where(inArray(users.email, emails));
  return new Map(rows.map(({ email, id }) => [email, id]));
}

async function makeProject(tx: Tx, project: DemoProject, idByEmail: Map<string, string>): Promise<void> {
  const roles = project.members.map(({ email, role }) => ({ userId: idByEmail.get(email)!, role }));
  const { name, customer, description, defaultSettings, comparisonLimitSetId } = project;
  const createdById = roles.find(({ role }) => role === 'manager')!.userId;
  const [created] = await tx
    .insert(projects)
    .values({ name, customer, description, defaultSettings, comparisonLimitSetId, createdById })
    .returning({ id: projects.id });
  await tx.insert(members).values(roles.map((role) => ({ ...role, projectId: created!.id })));
}
