import { Inject, Injectable } from '@nestjs/common';
import type { AddMember, Member, ProjectRole, UpdateMember } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { UsersService } from '../users/users.service.js';
import { MembersRepository, type MemberRow } from './members.repository.js';
import { ProjectsRepository } from './projects.repository.js';

const placeSchema = z.tuple([z.string(), z.uuid()]);

@Injectable()
export class MembersService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: MembersRepository,
    private readonly projects: ProjectsRepository,
    private readonly users: UsersService,
  ) {}

  async list(projectId: string, { cursor, limit }: { cursor?: string; limit: number }) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { name: place[0], userId: place[1] };
    const rows = await this.repository.list(projectId, after, limit + 1);
    return pageOfRows(rows, limit, (row) => [row.name, row.userId], toMember);
  }

  /** @throws 422 for an e-mail address without an account, 409 for a member */
  async add(projectId: string, { email, role }: AddMember): Promise<Member> {
    const user = await this.users.findEnabledByEmail(email);
    if (!user) {
      const message = 'No account has this e-mail address; ask an administrator to make one first';
      throw problem(422, 'unknown-person', message, [{ path: 'email', message }]);
    }
    return this.database.transaction(async (tx) => {
      if (!(await this.repository.insert(tx, projectId, user.id, role))) {
        const message = `${user.name} is a member already; change the role instead`;
        throw problem(409, 'already-member', message, [{ path: 'email', message }]);
      }
      return toMember(await this.find(tx, projectId, user.id));
    });
  }

  /** Makes a person a member inside the caller's transaction; one who is a member keeps their role. */
  async join(tx: Tx, projectId: string, userId: string, role: ProjectRole): Promise<void> {
    await this.repository.insert(tx, projectId, userId, role);
  }

  /** @throws 404 for a person who is no member, 409 when no manager would be left */
  setRole(projectId: string, userId: string, { role }: UpdateMember): Promise<Member> {
    return this.change(projectId, userId, async (tx, member) => {
      await this.repository.setRole(tx, projectId, userId, role);
      return toMember({ ...member, role });
    });
  }

  /** @throws 404 for a person who is no member, 409 when no manager would be left */
  async remove(projectId: string, userId: string): Promise<void> {
    await this.change(projectId, userId, (tx) => this.repository.delete(tx, projectId, userId));
  }

  private change<T>(
    projectId: string,
    userId: string,
    act: (tx: Tx, member: MemberRow) => Promise<T>,
  ): Promise<T> {
    return this.database.transaction(async (tx) => {
      await this.projects.lock(tx, projectId);
      const result = await act(tx, await this.find(tx, projectId, userId));
      if ((await this.repository.countManagers(tx, projectId)) === 0) {
        throw problem(409, 'last-manager', 'Name another manager first: a project keeps at least one');
      }
      return result;
    });
  }

  private async find(tx: Tx, projectId: string, userId: string): Promise<MemberRow> {
    const member = await this.repository.find(tx, projectId, userId);
    if (!member) throw problem(404, 'not-found', 'This person is no member of the project');
    return member;
  }
}

function toMember({ userId, name, email, role, addedAt }: MemberRow): Member {
  return { userId, name, email, role, addedAt: addedAt.toISOString() };
}
