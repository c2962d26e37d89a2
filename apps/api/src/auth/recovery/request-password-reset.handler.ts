import { Inject, Injectable } from '@nestjs/common';
import type { Database } from '@overtally/db';
import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import { DATABASE } from '../../database/database.tokens.js';
import { requestPasswordResetJob } from '../../jobs/definitions/request-password-reset.job.js';
import type { JobHandler } from '../../jobs/job-handler.js';
import { MailsService } from '../../mails/mails.service.js';
import { SecretLinks } from '../../mails/secret-links.js';
import { PasswordResetsRepository } from './password-resets.repository.js';

type Payload = z.infer<typeof requestPasswordResetJob.payload>;

const HOUR_MS = 60 * 60 * 1000;
/** How long a link works. */
export const resetLinkMinutes = 60;
/** More would only fill the mailbox of somebody whom others want to annoy. */
const LINKS_PER_HOUR = 5;

/** Sends the link for a new password, where there is an account to set it for. */
@Injectable()
export class RequestPasswordResetHandler implements JobHandler<Payload> {
  readonly definition = requestPasswordResetJob;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: PasswordResetsRepository,
    private readonly links: SecretLinks,
    private readonly mails: MailsService,
  ) {}

  async run({ email }: Payload): Promise<void> {
    const now = Date.now();
    await this.database.transaction(async (tx) => {
      const person = await this.repository.holdAccount(tx, email);
      if (!person) return;
      const sent = await this.repository.countSince(tx, person.id, new Date(now - HOUR_MS));
      if (sent >= LINKS_PER_HOUR) return;
      const id = randomUUID();
      await this.repository.insert(tx, {
        id,
        userId: person.id,
        tokenSha256: this.links.tokenSha256('password-reset', id),
        expiresAt: new Date(now + resetLinkMinutes * 60_000),
      });
      await this.mails.enqueue(tx, {
        kind: 'password-reset',
        to: person,
        subject: 'Set a new password',
        secret: { purpose: 'password-reset', id },
        message: {
          heading: 'Set a new password',
          facts: [['Account', person.email]],
          paragraphs: [
            'Somebody, probably you, asked for a new password. The link works once and for one hour.',
            'Setting a new password signs you out everywhere and removes your access keys.',
          ],
          action: { label: 'Set a new password' },
          reason: 'If you did not ask for this, leave the message alone: your password stays as it is.',
        },
      });
    });
  }

  /** Nothing waits for this job; the person asks again. */
  giveUp(): Promise<void> {
    return Promise.resolve();
  }
}
