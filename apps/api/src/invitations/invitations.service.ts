import { Inject, Injectable, Logger } from '@nestjs/common';
import type { CreateInvitation, Invitation } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import type { SignedInUser } from '../common/request.js';
import { DATABASE } from '../database/database.tokens.js';
import { MailsService } from '../mails/mails.service.js';
import { SecretLinks } from '../mails/secret-links.js';
import { stateOf, toInvitation } from './invitation-view.js';
import { InvitationsRepository } from './invitations.repository.js';
import { roleWords } from './role-words.js';

const LIFETIME_DAYS = 14;
const DAY_MS = 24 * 60 * 60 * 1000;

const placeSchema = z.tuple([z.iso.datetime(), z.uuid()]);

/** Invitations to a project by e-mail, as those see them who manage its members. */
@Injectable()
export class InvitationsService {
  private readonly logger = new Logger('Invitations');

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: InvitationsRepository,
    private readonly links: SecretLinks,
    private readonly mails: MailsService,
  ) {}

  async list(projectId: string, { cursor, limit }: { cursor?: string | undefined; limit: number }) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { createdAt: place[0], id: place[1] };
    const rows = await this.repository.list(projectId, after, limit + 1);
    return pageOfRows(
      rows,
      limit,
      ({ invitation }) => [invitation.createdAt.toISOString(), invitation.id],
      toInvitation,
    );
  }

  /**
   * Invites an address; an invitation that it has not answered is replaced.
   * @throws 409 for the address of a member
   */
  async invite(
    user: SignedInUser,
    projectId: string,
    { email, role }: CreateInvitation,
  ): Promise<Invitation> {
    const id = randomUUID();
    const expiresAt = new Date(Date.now() + LIFETIME_DAYS * DAY_MS);
    await this.database.transaction(async (tx) => {
      const projectName = await this.repository.holdProject(tx, projectId);
      if (await this.repository.isMember(tx, projectId, email)) {
        const message = 'This person is a member already; change the role instead';
        throw problem(409, 'already-member', message, [{ path: 'email', message }]);
      }
      await this.repository.revokeOpen(tx, projectId, email, new Date());
      await this.repository.insert(tx, {
        ...{ id, projectId, email, role, expiresAt },
        tokenSha256: this.links.tokenSha256('invitation', id),
        invitedById: user.id,
      });
      await this.mails.enqueue(tx, {
        kind: 'invitation',
        to: { name: '', email },
        projectId,
        subject: `Invitation to ${projectName}`,
        secret: { purpose: 'invitation', id },
        message: {
          heading: `${user.name} invites you to a project`,
          facts: [
            ['Project', projectName],
            ['Your role', roleWords[role]],
            ['Valid until', `${expiresAt.toISOString().slice(0, 16).replace('T', ' ')} UTC`],
          ],
          paragraphs: [
            'The link works once. It asks for your name and a password unless you have an account.',
          ],
          action: { label: 'Accept the invitation' },
          reason: `You get this message because ${user.name} (${user.email}) entered your address. If you do not expect it, leave it alone.`,
        },
      });
    });
    this.logger.log({ invitation: id, project: projectId, role, by: user.id }, 'A person was invited');
    return this.get(id);
  }

  /** Takes an invitation back. @throws 409 for one that was accepted */
  async revoke(user: SignedInUser, id: string): Promise<void> {
    await this.database.transaction(async (tx) => {
      const row = await this.repository.hold(tx, id);
      if (!row) throw noSuchInvitation();
      const now = new Date();
      if (stateOf(row, now) === 'accepted') {
        throw problem(409, 'already-accepted', 'The invitation was accepted; remove the member instead');
      }
      if (row.revokedAt === null) await this.repository.update(tx, id, { revokedAt: now });
    });
    this.logger.log({ invitation: id, by: user.id }, 'An invitation was taken back');
  }

  private async get(id: string): Promise<Invitation> {
    const row = await this.repository.find(id);
    if (!row) throw noSuchInvitation();
    return toInvitation(row);
  }
}

const noSuchInvitation = () => problem(404, 'not-found', 'There is no such invitation');
