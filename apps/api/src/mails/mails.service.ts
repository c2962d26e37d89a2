import { Inject, Injectable } from '@nestjs/common';
import type {
  Mail,
  MailAttachment,
  MailboxPage,
  MailKind,
  MailMessage,
  MailQuery,
} from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { AppConfig } from '../config/app-config.js';
import { DATABASE } from '../database/database.tokens.js';
import { sendMailJob } from '../jobs/definitions/send-mail.job.js';
import { JobsService } from '../jobs/jobs.service.js';
import { Storage } from '../storage/storage.js';
import { toMail } from './mail-view.js';
import { MailsRepository, type MailFilter } from './mails.repository.js';
import type { Message } from './messages/message.js';
import { renderMessage } from './messages/render-message.js';
import type { SecretPurpose } from './secret-links.js';
import { messageId, OutgoingMails, secretPlace } from './sending/outgoing-mails.js';

/** A message to be sent. */
export interface NewMail {
  kind: MailKind;
  to: { name: string; email: string };
  subject: string;
  /** Its action's address is left out where `secret` is given: the link with the secret goes there. */
  message: Omit<Message, 'action'> & { action?: { label: string; href?: string } };
  projectId?: string;
  reportId?: string;
  attachments?: MailAttachment[];
  /** The row whose secret the link of the message carries. */
  secret?: { purpose: SecretPurpose; id: string };
}

const placeSchema = z.tuple([z.iso.datetime(), z.uuid()]);

/** The outbox: other rooms put messages into it, a worker sends them. */
@Injectable()
export class MailsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly config: AppConfig,
    private readonly repository: MailsRepository,
    private readonly outgoing: OutgoingMails,
    private readonly jobs: JobsService,
    private readonly storage: Storage,
  ) {}

  /** Puts a message into the outbox; it goes out once, and only if, the transaction commits. */
  async enqueue(tx: Tx, { to, message, secret, attachments = [], ...mail }: NewMail): Promise<string> {
    const id = randomUUID();
    const { action } = message;
    const href = secret ? secretPlace(id) : (action?.href ?? this.config.publicUrl);
    const rendered = renderMessage(
      { ...message, ...(action ? { action: { label: action.label, href } } : { action: undefined }) },
      (await this.repository.laboratoryName(tx)) || 'Overtally',
    );
    await this.repository.insert(tx, {
      ...mail,
      ...rendered,
      ...{ id, attachments, toAddress: to.email, toName: to.name },
      subject: singleLine(mail.subject),
      invitationId: secret?.purpose === 'invitation' ? secret.id : null,
      passwordResetId: secret?.purpose === 'password-reset' ? secret.id : null,
    });
    await this.jobs.enqueue(tx, sendMailJob, { mailId: id });
    return id;
  }

  /** The messages of a report's recipients and the like, the newest first. */
  async page(filter: MailFilter, { cursor, limit }: { cursor?: string | undefined; limit: number }) {
    const place = decodeCursor(cursor, placeSchema);
    const after = place && { createdAt: place[0], id: place[1] };
    const rows = await this.repository.list(filter, after, limit + 1);
    return pageOfRows(rows, limit, (row) => [row.createdAt.toISOString(), row.id], toMail);
  }

  async mailbox({ status, ...paging }: MailQuery): Promise<MailboxPage> {
    return { ...(await this.page({ status }, paging)), delivery: this.config.mail.smtp ? 'smtp' : 'local' };
  }

  /** A message whole. Where mail goes out, its link stays between the message and its reader. */
  async message(id: string): Promise<MailMessage> {
    const row = await this.find(id);
    const { text, html, link } = await this.outgoing.shown(row);
    const { name, address } = this.config.mail.from;
    return {
      ...toMail(row),
      from: name === '' ? address : `${name} <${address}>`,
      messageId: messageId(row, address),
      ...{ text, html, link },
    };
  }

  async get(id: string): Promise<Mail> {
    return toMail(await this.find(id));
  }

  /** @throws 404 when the message has no attachment at this place */
  async attachment(id: string, position: number): Promise<{ bytes: Uint8Array; file: MailAttachment }> {
    const file = (await this.find(id)).attachments[position];
    if (!file) throw problem(404, 'not-found', 'The message has no such attachment');
    return { file, bytes: await this.storage.readBytes(file.storageKey) };
  }

  /**
   * Has a message sent that waits or was given up, at once and with all attempts anew.
   * @throws 409 for a message that was sent, or is being sent
   */
  async retry(id: string): Promise<Mail> {
    await this.database.transaction(async (tx) => {
      const row = await this.repository.hold(tx, id).catch((error: unknown) => {
        if (isLocked(error)) throw problem(409, 'mail-in-hand', 'The message is being sent right now');
        throw error;
      });
      if (!row) throw noSuchMail();
      if (row.status === 'sent') throw problem(409, 'mail-sent', 'The message was sent already');
      await this.repository.update(tx, id, { status: 'queued' });
      await this.jobs.enqueue(tx, sendMailJob, { mailId: id });
    });
    return this.get(id);
  }

  private async find(id: string) {
    const row = await this.repository.find(id);
    if (!row) throw noSuchMail();
    return row;
  }
}

const noSuchMail = () => problem(404, 'not-found', 'There is no such mail');

/** PostgreSQL, appendix A: 55P03 is lock_not_available. */
function isLocked(error: unknown): boolean {
  const { code, cause } = error as { code?: unknown; cause?: { code?: unknown } };
  return code === '55P03' || cause?.code === '55P03';
}

/** A subject is one line (RFC 5322, 2.2.3); names that people gave may hold others. */
const singleLine = (text: string): string => text.replace(/\s+/g, ' ').trim().slice(0, 200);
