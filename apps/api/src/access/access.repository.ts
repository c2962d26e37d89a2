import { Inject, Injectable } from '@nestjs/common';
import { schema, type Database } from '@overtally/db';
import { and, eq, isNull } from 'drizzle-orm';
import type { ProjectAccess, SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import type { ResourceKind } from './require-permission.decorator.js';

const { users, members, projects, recordings, analyses, notes, verdicts, reports, limitSets } = schema;

@Injectable()
export class AccessRepository {
  constructor(@Inject(DATABASE) private readonly database: Database) {}

  /** The person of a session; undefined once disabled. */
  async findSignedInUser(userId: string): Promise<SignedInUser | undefined> {
    const [user] = await this.database
      .select({
        id: users.id,
        email: users.email,
        name: users.name,
        isAdministrator: users.isAdministrator,
      })
      .from(users)
      .where(and(eq(users.id, userId), isNull(users.disabledAt)));
    return user;
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
      case 'report':
        return this.database.select({ projectId: reports.projectId }).from(reports).where(eq(reports.id, id));
      case 'limit-set':
        return this.database
          .select({ projectId: limitSets.projectId })
          .from(limitSets)
          .where(eq(limitSets.id, id));
    }
  }
}
