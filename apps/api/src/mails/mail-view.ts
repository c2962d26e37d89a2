import type { Mail } from '@overtally/contracts';
import type { MailRow } from './mails.repository.js';

/** A message as lists show it: nothing of what it says beyond its subject. */
export function toMail(row: MailRow): Mail {
  return {
    id: row.id,
    kind: row.kind,
    to: { name: row.toName, email: row.toAddress },
    subject: row.subject,
    status: row.status,
    attempts: row.attempts,
    lastError: row.lastError,
    createdAt: row.createdAt.toISOString(),
    lastAttemptAt: row.lastAttemptAt?.toISOString() ?? null,
    sentAt: row.sentAt?.toISOString() ?? null,
    attachments: row.attachments.map(({ fileName, sha256 }) => ({ fileName, sha256 })),
  };
}
