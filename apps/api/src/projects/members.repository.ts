import { Inject, Injectable } from '@nestjs/common';
import type { ProjectRole } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { and, asc, eq, sql } from 'drizzle-orm';
import { DATABASE } from '../database/database.tokens.js';

const { members, users } = schema;

export type MemberRow = Awaited<ReturnType<MembersRepository['list']>>[number];

/** Where a page of the list begins: after this name, among equal names after this person. */
export interface MemberPlace {
  name: string;
  userId: string;
}

@Injectable()
export class MembersRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** Members of a project by name. */
  list(projectId: string, after: MemberPlace | undefined, limit: number) {
    return this.select(this.database)
      .where(
        and(
          eq(members.projectId, projectId),
          after && sql`(${users.name}, ${users.id}) > (${after.name}, ${after.userId}::uuid)`,
        ),
      )
      .orderBy(asc(users.name), asc(users.id))
      .limit(limit);
  }

  async find(tx: Tx, projectId: string, userId: string): Promise<MemberRow | undefined> {
    const [row] = await this.select(tx).where(
      and(eq(members.projectId, projectId), eq(members.userId, userId)),
    );
    return row;
  }

  /** False when the person is a member already. */
  async insert(tx: Tx, projectId: string, userId: string, role: ProjectRole): Promise<boolean> {
    const rows = await tx
      .insert(members)
      .values({ projectId, userId, role })
      .onConflictDoNothing()
      .returning({ userId: members.userId });
    return rows.length > 0;
  }

  async setRole(tx: Tx, projectId: string, userId: string, role: ProjectRole): Promise<void> {
    await tx
      .update(members)
      .set({ role })
      .where(and(eq(members.projectId, projectId), eq(members.userId, userId)));
  }

  async delete(tx: Tx, projectId: string, userId: string): Promise<void> {
    await tx.delete(members).where(and(eq(members.projectId, projectId), eq(members.userId, userId)));
  }

  countManagers(tx: Tx, projectId: string): Promise<number> {
    return tx.$count(members, and(eq(members.projectId, projectId), eq(members.role, 'manager')));
  }

  private select(from: Database | Tx) {
    return from
      .select({
        userId: members.userId,
        name: users.name,
        email: users.email,
        role: members.role,
        addedAt: members.addedAt,
      })
      .from(members)
      .innerJoin(users, eq(users.id, members.userId));
  }
}
