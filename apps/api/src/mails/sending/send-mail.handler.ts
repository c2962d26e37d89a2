import { Inject, Injectable } from '@nestjs/common';
import type { ReadProblem } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import type { z } from 'zod';
import { DATABASE } from '../../database/database.tokens.js';
import { sendMailJob } from '../../jobs/definitions/send-mail.job.js';
import type { JobContext, JobHandler } from '../../jobs/job-handler.js';
import { MailsRepository, type MailRow } from '../mails.repository.js';
import { MailTransport, type Handover } from './mail-transport.js';
import { OutgoingMails, UnfitMail } from './outgoing-mails.js';

type Payload = z.infer<typeof sendMailJob.payload>;

/** The message waits for a later attempt. */
class MailDelayed extends Error {
  override name = 'MailDelayed';
}

/**
 * Sends a message of the outbox. Its row is held meanwhile, so that it goes out from one place at a time. A process that
 * ends between the server's yes and the commit sends it again: at least once, with the same Message-ID.
 */
@Injectable()
export class SendMailHandler implements JobHandler<Payload> {
  readonly definition = sendMailJob;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: MailsRepository,
    private readonly outgoing: OutgoingMails,
    private readonly transport: MailTransport,
  ) {}

  /** @throws MailDelayed when it could not be handed on yet, with the reason kept in its row */
  async run({ mailId }: Payload, { signal }: JobContext): Promise<void> {
    const handover = await this.database.transaction(async (tx) => {
      const row = await this.repository.hold(tx, mailId);
      if (row?.status !== 'queued') return undefined;
      const outcome = await this.handOn(row, signal);
      // A stop is no fault of the message: nothing is kept of it, and the queue gives the attempt back.
      if (outcome.kind === 'delayed') signal.throwIfAborted();
      const now = new Date();
      await this.repository.update(tx, mailId, {
        attempts: row.attempts + 1,
        lastAttemptAt: now,
        ...(outcome.kind === 'sent' && { status: 'sent', sentAt: now, lastError: null }),
        ...(outcome.kind === 'refused' && { status: 'failed' }),
        ...(outcome.kind !== 'sent' && { lastError: outcome.reason }),
      });
      return outcome;
    });
    if (handover?.kind === 'delayed') throw new MailDelayed(handover.reason);
  }

  /** After the last attempt the message has failed; what the server said last is kept. */
  async giveUp({ mailId }: Payload, { message }: ReadProblem): Promise<void> {
    await this.database.transaction(async (tx) => {
      const row = await this.repository.hold(tx, mailId);
      if (row?.status !== 'queued') return;
      await this.repository.update(tx, mailId, { status: 'failed', lastError: row.lastError ?? message });
    });
  }

  private async handOn(row: MailRow, signal: AbortSignal): Promise<Handover> {
    try {
      const mail = await this.outgoing.prepare(row);
      return await this.transport.send(
        mail,
        { name: row.toName, address: row.toAddress },
        row.subject,
        signal,
      );
    } catch (error) {
      if (error instanceof UnfitMail) return { kind: 'refused', reason: error.message };
      throw error;
    }
  }
}
