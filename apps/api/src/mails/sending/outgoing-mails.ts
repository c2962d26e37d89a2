import { Injectable } from '@nestjs/common';
import { createHash } from 'node:crypto';
import { AppConfig } from '../../config/app-config.js';
import { isMissingObject } from '../../storage/missing-object.js';
import { Storage } from '../../storage/storage.js';
import { MailsRepository, type MailRow, type SecretRow } from '../mails.repository.js';
import { escaped } from '../messages/render-message.js';
import { SecretLinks } from '../secret-links.js';

export interface OutgoingMail {
  messageId: string;
  text: string;
  html: string;
  attachments: { filename: string; contentType: string; content: Buffer }[];
}

/** Why a message must not go out; trying again does not help until somebody mends it. */
export class UnfitMail extends Error {}

/** Messages with what is not kept in their row: the secret of their link, and the bytes of their attachments. */
@Injectable()
export class OutgoingMails {
  constructor(
    private readonly config: AppConfig,
    private readonly repository: MailsRepository,
    private readonly links: SecretLinks,
    private readonly storage: Storage,
  ) {}

  /** @throws UnfitMail when its link no longer works or an attachment is not the file that was issued */
  async prepare(row: MailRow, now = new Date()): Promise<OutgoingMail> {
    const link = await this.link(row, now);
    return {
      messageId: messageId(row, this.config.mail.from.address),
      ...withLink(row, link ?? ''),
      attachments: await this.attachments(row),
    };
  }

  /** A message as the mailbox shows it; the link is told where messages do not leave this installation. */
  async shown(row: MailRow): Promise<{ text: string; html: string; link: string | null }> {
    if (this.config.mail.smtp)
      return { ...withLink(row, '(the link stands in the message alone)'), link: null };
    try {
      const link = await this.link(row, new Date());
      return { ...withLink(row, link ?? ''), link };
    } catch (error) {
      if (!(error instanceof UnfitMail)) throw error;
      return { ...withLink(row, `(${error.message})`), link: null };
    }
  }

  private async link(row: MailRow, now: Date): Promise<string | null> {
    const secret = await this.repository.secretOf(row);
    if (!secret) return null;
    const { purpose, id, tokenSha256 } = secret;
    const flaw = whyDead(secret, now);
    if (flaw !== null) throw new UnfitMail(flaw);
    if (this.links.tokenSha256(purpose, id) !== tokenSha256) {
      throw new UnfitMail('SESSION_SECRET was changed since the link was made; ask for a new one');
    }
    return this.links.link(purpose, id);
  }

  private async attachments({ attachments }: MailRow): Promise<OutgoingMail['attachments']> {
    const read = [];
    for (const { fileName, contentType, storageKey, sha256 } of attachments) {
      const bytes = await this.storage.readBytes(storageKey).catch((error: unknown) => {
        if (!isMissingObject(error)) throw error;
        throw new UnfitMail(
          `${fileName} is missing in the storage; restore it from the backup, then send again`,
        );
      });
      if (createHash('sha256').update(bytes).digest('hex') !== sha256) {
        throw new UnfitMail(
          `${fileName} is not the file that was issued; restore it from the backup, then send again`,
        );
      }
      read.push({ filename: fileName, contentType, content: Buffer.from(bytes) });
    }
    return read;
  }
}

/** The same at each attempt, so that a receiver can tell a message that comes twice (RFC 5322, 3.6.4). */
export const messageId = ({ id }: Pick<MailRow, 'id'>, sender: string): string =>
  `<${id}@${sender.slice(sender.lastIndexOf('@') + 1)}>`;

/** Stands in a kept message where its secret link goes; nobody knows the id while the words are written. */
export const secretPlace = (mailId: string): string => `https://link.invalid/${mailId}`;

function withLink({ id, text, html }: MailRow, link: string): { text: string; html: string } {
  const place = secretPlace(id);
  return { text: text.replaceAll(place, () => link), html: html.replaceAll(place, () => escaped(link)) };
}

function whyDead({ usedAt, revokedAt, expiresAt }: SecretRow, now: Date): string | null {
  if (usedAt !== null) return 'the link was used already';
  if (revokedAt !== null) return 'the invitation was taken back';
  return expiresAt <= now ? 'the link has expired' : null;
}
