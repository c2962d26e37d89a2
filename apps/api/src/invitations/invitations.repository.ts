import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { DATABASE } from '../database/database.tokens.js';

const { invitations, mails, members, projects, users } = schema;
const inviters = alias(users, 'inviters');

export type InvitationRow = Awaited<ReturnType<InvitationsRepository['list']>>[number];
export type OfferRow = NonNullable<Awaited<ReturnType<InvitationsRepository['findByToken']>>>;

/** Where a page of the list begins: behind the invitation made then, with this id. */
export interface InvitationPlace {
  createdAt: string;
  id: string;
}

@Injectable()
export class InvitationsRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Invitations to a project with their messages, the newest first. */
  list(projectId: string, after: InvitationPlace | undefined, limit: number) {
    const behind =
      after &&
      sql`(${invitations.createdAt}, ${invitations.id}) < (${after.createdAt}::timestamptz, ${after.id}::uuid)`;
    return this.select()
      .where(and(eq(invitations.projectId, projectId), behind))
      .orderBy(desc(invitations.createdAt), desc(invitations.id))
      .limit(limit);
  }

  async find(id: string): Promise<InvitationRow | undefined> {
    const [row] = await this.select().where(eq(invitations.id, id));
    return row;
  }

  /** What the holder of a secret is shown. */
  async findByToken(tokenSha256: string) {
    const [row] = await this.database
      .select({
        invitation: invitations,
        projectName: projects.name,
        inviterName: inviters.name,
        accountId: users.id,
      })
      .from(invitations)
      .innerJoin(projects, eq(projects.id, invitations.projectId))
      .innerJoin(inviters, eq(inviters.id, invitations.invitedById))
      .leftJoin(users, eq(users.email, invitations.email))
      .where(eq(invitations.tokenSha256, tokenSha256));
    return row;
  }

  async isMember(tx: Tx, projectId: string, email: string): Promise<boolean> {
    const rows = await tx
      .select({ id: users.id })
      .from(members)
      .innerJoin(users, eq(users.id, members.userId))
      .where(and(eq(members.projectId, projectId), eq(users.email, email)));
    return rows.length > 0;
  }

  async insert(tx: Tx, row: typeof invitations.$inferInsert): Promise<void> {
    await tx.insert(invitations).values(row);
  }

  /** The name of the project, whose invitations are held until the transaction ends. */
  async holdProject(tx: Tx, id: string): Promise<string> {
    const [row] = await tx
      .select({ name: projects.name })
      .from(projects)
      .where(eq(projects.id, id))
      .for('update');
    if (!row) throw new Error(`Project ${id} has gone`);
    return row.name;
  }

  async hold(tx: Tx, id: string) {
    const [row] = await tx.select().from(invitations).where(eq(invitations.id, id)).for('update');
    return row;
  }

  async update(tx: Tx, id: string, change: Partial<typeof invitations.$inferInsert>): Promise<void> {
    await tx.update(invitations).set(change).where(eq(invitations.id, id));
  }

  /** Takes back what an address was sent before and has not answered. */
  async revokeOpen(tx: Tx, projectId: string, email: string, now: Date): Promise<void> {
    await tx
      .update(invitations)
      .set({ revokedAt: now })
      .where(
        and(
          eq(invitations.projectId, projectId),
          eq(invitations.email, email),
          isNull(invitations.acceptedAt),
          isNull(invitations.revokedAt),
        ),
      );
  }

  private select() {
    return this.database
      .select({ invitation: invitations, inviterName: inviters.name, mail: mails })
      .from(invitations)
      .innerJoin(inviters, eq(inviters.id, invitations.invitedById))
      .leftJoin(mails, eq(mails.invitationId, invitations.id));
  }
}
