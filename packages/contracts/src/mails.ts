import { z } from 'zod';
import { idSchema, pageOf, timestampSchema } from './common.js';

export const mailKindSchema = z.enum([
  'review-requested',
  'report-returned',
  'report-issued',
  'calibration-due',
  'invitation',
  'password-reset',
]);
export type MailKind = z.infer<typeof mailKindSchema>;

/** `failed`: given up after the last attempt; an administrator or manager may send it again. */
export const mailStatusSchema = z.enum(['queued', 'sent', 'failed']);
export type MailStatus = z.infer<typeof mailStatusSchema>;

/** A file that goes with a message, by its key in storage. */
export const mailAttachmentSchema = z.object({
  fileName: z.string(),
  contentType: z.string(),
  storageKey: z.string(),
  sha256: z.string(),
});
export type MailAttachment = z.infer<typeof mailAttachmentSchema>;

/** A message as a report or the mailbox lists it. */
export const mailSchema = z.object({
  id: idSchema,
  kind: mailKindSchema,
  to: z.object({ name: z.string(), email: z.string() }),
  subject: z.string(),
  status: mailStatusSchema,
  attempts: z.number().int(),
  lastError: z.string().nullable(),
  createdAt: timestampSchema,
  lastAttemptAt: timestampSchema.nullable(),
  sentAt: timestampSchema.nullable(),
  attachments: z.array(z.object({ fileName: z.string(), sha256: z.string() })),
});
export type Mail = z.infer<typeof mailSchema>;
export const mailPageSchema = pageOf(mailSchema);
