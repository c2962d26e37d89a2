import { z } from 'zod';
import { idSchema, pageOf, pageQuerySchema, timestampSchema } from './common.js';

export const emailSchema = z
  .email()
  .max(254)
  .transform((email) => email.toLowerCase())
  .describe('E-mail address, compared without regard to case');

export const newPasswordSchema = z
  .string()
  .min(12, 'Use at least 12 characters')
  .max(256, 'Use at most 256 characters')
  .describe('New password, 12 to 256 characters');

export const signInSchema = z.object({ email: emailSchema, password: z.string().min(1).max(256) });
export type SignIn = z.infer<typeof signInSchema>;

export const changePasswordSchema = z.object({
  currentPassword: z.string().min(1).max(256),
  newPassword: newPasswordSchema,
});
export type ChangePassword = z.infer<typeof changePasswordSchema>;

export const accountSchema = z.object({
  id: idSchema,
  email: z.string(),
  name: z.string(),
  isAdministrator: z.boolean(),
});
export type Account = z.infer<typeof accountSchema>;

/** One's own account, with what it opens outside the projects. */
export const ownAccountSchema = accountSchema.extend({
  worksInLaboratory: z
    .boolean()
    .describe('Whether it may use what the projects of the laboratory share, such as instruments'),
});
export type OwnAccount = z.infer<typeof ownAccountSchema>;

export const updateAccountSchema = z.object({ name: z.string().trim().min(1).max(120) });
export type UpdateAccount = z.infer<typeof updateAccountSchema>;

/** A personal access key, as its owner sees it later on; the secret is shown once. */
export const accessKeySchema = z.object({
  id: idSchema,
  name: z.string(),
  prefix: z.string().describe('First characters of the secret, to tell keys apart'),
  createdAt: timestampSchema,
  lastUsedAt: timestampSchema.nullable().describe('To the minute'),
  expiresAt: timestampSchema.nullable().describe('Null: until it is removed'),
});
export type AccessKey = z.infer<typeof accessKeySchema>;
export const accessKeyPageSchema = pageOf(accessKeySchema);

export const createAccessKeySchema = z.object({
  name: z.string().trim().min(1, 'Name the key').max(80).describe('What the key is for'),
  expiresInDays: z
    .number()
    .int()
    .min(1)
    .max(3650)
    .optional()
    .describe('Days until it expires; absent: until it is removed'),
});
export type CreateAccessKey = z.infer<typeof createAccessKeySchema>;

export const createdAccessKeySchema = accessKeySchema.extend({
  secret: z.string().describe('Send it as `Authorization: Bearer …`; it cannot be read again'),
});
export type CreatedAccessKey = z.infer<typeof createdAccessKeySchema>;

/** A person as an administrator sees them. */
export const userSchema = accountSchema.extend({
  disabledAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
});
export type User = z.infer<typeof userSchema>;
export const userPageSchema = pageOf(userSchema);

export const userQuerySchema = pageQuerySchema.extend({
  q: z.string().trim().max(200).optional().describe('Looks in name and e-mail'),
});
export type UserQuery = z.infer<typeof userQuerySchema>;

export const createUserSchema = z.object({
  email: emailSchema,
  name: z.string().trim().min(1).max(120),
  password: newPasswordSchema,
  isAdministrator: z.boolean().default(false),
});
export type CreateUser = z.infer<typeof createUserSchema>;

export const updateUserSchema = z.object({
  name: z.string().trim().min(1).max(120).optional(),
  isAdministrator: z.boolean().optional(),
  disabled: z.boolean().optional(),
  password: newPasswordSchema.optional().describe('Set by an administrator; ends the person’s sessions'),
});
export type UpdateUser = z.infer<typeof updateUserSchema>;
