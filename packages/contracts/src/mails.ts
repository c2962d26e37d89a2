import { z } from 'zod';
import { projectRoleSchema } from './access.js';
import { idSchema, pageOf, pageQuerySchema, personRefSchema, timestampSchema } from './common.js';
import { accountSchema, emailSchema, newPasswordSchema } from './people.js';
import { reportRecipientSchema } from './reports.js';

export const mailKindSchema = z.enum([
  'review-requested',
  'report-returned',
  'report-issued',
  'calibration-due',
  'invitation',
  'password-reset',
  'password-changed',
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

export const mailQuerySchema = pageQuerySchema.extend({
  status: mailStatusSchema.optional().describe('Only messages of this status'),
});
export type MailQuery = z.infer<typeof mailQuerySchema>;

/** Where messages go: out by a mail server, or into the local mailbox, where they can be read whole. */
export const mailboxPageSchema = mailPageSchema.extend({
  delivery: z.enum(['smtp', 'local']).describe('How this installation delivers'),
});
export type MailboxPage = z.infer<typeof mailboxPageSchema>;

/** A message whole. Links with a secret are told in the local mailbox alone. */
export const mailMessageSchema = mailSchema.extend({
  from: z.string(),
  messageId: z.string().describe('Message-ID (RFC 5322, 3.6.4), the same at every attempt'),
  text: z.string(),
  html: z.string(),
  link: z.string().nullable().describe('The link with its secret; null without one and where mail goes out'),
});
export type MailMessage = z.infer<typeof mailMessageSchema>;

/** One more recipient of an issued report. */
export const sendReportSchema = z.strictObject(reportRecipientSchema.shape);
export type SendReport = z.infer<typeof sendReportSchema>;

export const invitationStateSchema = z.enum(['open', 'accepted', 'revoked', 'expired']);
export type InvitationState = z.infer<typeof invitationStateSchema>;

/** An invitation as those see it who manage the members of its project. */
export const invitationSchema = z.object({
  id: idSchema,
  projectId: idSchema,
  email: z.string(),
  role: projectRoleSchema,
  state: invitationStateSchema,
  invitedBy: personRefSchema,
  createdAt: timestampSchema,
  expiresAt: timestampSchema,
  acceptedAt: timestampSchema.nullable(),
  mail: mailSchema.nullable().describe('How its message fared'),
});
export type Invitation = z.infer<typeof invitationSchema>;
export const invitationPageSchema = pageOf(invitationSchema);

export const createInvitationSchema = z.strictObject({ email: emailSchema, role: projectRoleSchema });
export type CreateInvitation = z.infer<typeof createInvitationSchema>;

/** The secret of a link: 256 bits in base64url. */
const tokenSchema = z
  .string()
  .max(200)
  .regex(/^[\w-]+$/, 'The link is not complete; open it as it stands in the message')
  .describe('What stands behind # in the link');

export const lookAtInvitationSchema = z.strictObject({ token: tokenSchema });

/** What an invitation says to whoever holds its link. */
export const offeredInvitationSchema = z.object({
  projectName: z.string(),
  role: projectRoleSchema,
  email: z.string(),
  invitedBy: z.string(),
  expiresAt: timestampSchema,
  hasAccount: z.boolean().describe('Whether the address has an account; it must then be signed in to accept'),
});
export type OfferedInvitation = z.infer<typeof offeredInvitationSchema>;

export const acceptInvitationSchema = z.strictObject({
  token: tokenSchema,
  name: z.string().trim().min(1, 'Give your name').max(120).optional().describe('For a new account'),
  password: newPasswordSchema.optional().describe('For a new account'),
});
export type AcceptInvitation = z.infer<typeof acceptInvitationSchema>;

export const acceptedInvitationSchema = z.object({ projectId: idSchema, account: accountSchema });
export type AcceptedInvitation = z.infer<typeof acceptedInvitationSchema>;

export const forgotPasswordSchema = z.strictObject({ email: emailSchema });
export type ForgotPassword = z.infer<typeof forgotPasswordSchema>;

/** The same whether or not the address has an account. */
export const sentResetLinkSchema = z.object({
  validForMinutes: z.number().int().describe('If the address has an account, a link is on its way'),
});
export type SentResetLink = z.infer<typeof sentResetLinkSchema>;

export const resetPasswordSchema = z.strictObject({ token: tokenSchema, password: newPasswordSchema });
export type ResetPassword = z.infer<typeof resetPasswordSchema>;
