import { Inject, Injectable } from '@nestjs/common';
import { laboratoryRoles, type ProjectRole } from '@overtally/contracts';
import { schema, type Database } from '@overtally/db';
import { and, eq, gt, inArray, isNull, or, sql } from 'drizzle-orm';
import type { ProjectAccess, SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import type { ResourceKind } from './require-permission.decorator.js';

const { accessKeys, users, members, projects, readingRules, recordings, analyses, notes } = schema;
const { equipment, verdicts, reports, limitSets, studies, invitations, mails } = schema;

const person = { id: users.id, email: users.email, name: users.name, isAdministrator: users.isAdministrator };

/** A script may ask many times a second; when a key was last used is kept to the minute. */
const USE_RECORDED_EVERY_MS = 60_000;

@Injectable()
export class AccessRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** The person of a session; undefined once disabled. */
  async findSignedInUser(userId: string): Promise<SignedInUser | undefined> {
    const [user] = await this.database
      .select(person)
      .from(users)
      .where(and(eq(users.id, userId), isNull(users.disabledAt)));
    return user;
  }

  /** The person a key belongs to; undefined for an unknown or expired key and once the person is disabled. */
  async findKeyHolder(secretSha256: string): Promise<SignedInUser | undefined> {
    const now = new Date();
    const [row] = await this.database
      .select({ person, keyId: accessKeys.id, lastUsedAt: accessKeys.lastUsedAt })
      .from(accessKeys)
      .innerJoin(users, eq(users.id, accessKeys.userId))
      .where(
        and(
          eq(accessKeys.secretSha256, secretSha256),
          or(isNull(accessKeys.expiresAt), gt(accessKeys.expiresAt, now)),
          isNull(users.disabledAt),
        ),
      );
    if (row === undefined) return undefined;
    if (now.getTime() - (row.lastUsedAt?.getTime() ?? 0) > USE_RECORDED_EVERY_MS) {
      await this.database.update(accessKeys).set({ lastUsedAt: now }).where(eq(accessKeys.id, row.keyId));
    }
    return row.person;
  }

  /** A role that makes the person one of the laboratory; null where they hold none in any project. */
  async findLaboratoryRole(userId: string): Promise<ProjectRole | null> {
    const [member] = await this.database
      .select({ role: members.role })
      .from(members)
      .where(and(eq(members.userId, userId), inArray(members.role, [...laboratoryRoles])))
      .limit(1);
    return member?.role ?? null;
  }

  /** The project a thing belongs to and the person's role there; undefined when there is no such thing. */
  async findProjectAccess(
    resource: ResourceKind,
    id: string,
    userId: string,
  ): Promise<ProjectAccess | undefined> {
    const owner = this.projectOf(resource, id).as('owner');
    const [access] = await this.database
      .select({ projectId: owner.projectId, role: members.role })
      .from(owner)
      .leftJoin(members, and(eq(members.projectId, owner.projectId), eq(members.userId, userId)));
    return access;
  }

  private projectOf(resource: ResourceKind, id: string) {
    const viaRecording = this.database.select({ projectId: recordings.projectId });
    switch (resource) {
      case 'project':
        return this.database.select({ projectId: projects.id }).from(projects).where(eq(projects.id, id));
      case 'equipment':
        return this.database
          .select({ projectId: equipment.projectId })
          .from(equipment)
          .where(eq(equipment.id, id));
      case 'reading-rule':
        return this.database
          .select({ projectId: readingRules.projectId })
          .from(readingRules)
          .where(eq(readingRules.id, id));
      case 'recording':
        return viaRecording.from(recordings).where(eq(recordings.id, id));
      case 'analysis':
        return viaRecording
          .from(analyses)
          .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
          .where(eq(analyses.id, id));
      case 'note':
        return viaRecording
          .from(notes)
          .innerJoin(analyses, eq(analyses.id, notes.analysisId))
          .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
          .where(eq(notes.id, id));
      case 'verdict':
        return viaRecording
          .from(verdicts)
          .innerJoin(analyses, eq(analyses.id, verdicts.analysisId))
          .innerJoin(recordings, eq(recordings.id, analyses.recordingId))
          .where(eq(verdicts.id, id));
      case 'study':
        return this.database.select({ projectId: studies.projectId }).from(studies).where(eq(studies.id, id));
      case 'report':
        return this.database.select({ projectId: reports.projectId }).from(reports).where(eq(reports.id, id));
      case 'invitation':
        return this.database
          .select({ projectId: invitations.projectId })
          .from(invitations)
          .where(eq(invitations.id, id));
      case 'mail':
        // Messages of no project, such as those about accounts, are for administrators, whose access needs none.
        return this.database
          .select({ projectId: sql<string>`${mails.projectId}`.as('mail_project_id') })
          .from(mails)
          .where(eq(mails.id, id));
      case 'limit-set':
        return this.database
          .select({ projectId: limitSets.projectId })
          .from(limitSets)
          .where(eq(limitSets.id, id));
    }
  }
}
