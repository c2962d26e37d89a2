import { z } from 'zod';
import { projectRoleSchema } from './access.js';
import { settingsSchema } from './analyses.js';
import { idSchema, pageOf, pageQuerySchema, timestampSchema } from './common.js';

const name = z.string().trim().min(1).max(160).describe('Name of the project');

export const createProjectSchema = z.object({
  name,
  customer: z.string().trim().max(160).default('').describe('For whom the work is done'),
  customerContact: z
    .string()
    .trim()
    .max(500)
    .default('')
    .describe('Address of the customer and how to reach them, as reports print it'),
  description: z.string().trim().max(2000).default(''),
  defaultSettings: settingsSchema
    .prefault({ profile: 'mains', nominalFrequencyHz: 'auto' })
    .describe('Settings of the analysis that follows each reading'),
  comparisonLimitSetId: z
    .string()
    .max(80)
    .nullable()
    .default(null)
    .describe('Limit set that lists compare with'),
});
export type CreateProject = z.infer<typeof createProjectSchema>;

export const updateProjectSchema = z
  .object({
    name,
    customer: z.string().trim().max(160),
    customerContact: z.string().trim().max(500),
    preparerMayIssue: z.boolean(),
    description: z.string().trim().max(2000),
    defaultSettings: settingsSchema,
    comparisonLimitSetId: z.string().max(80).nullable(),
    archived: z.boolean(),
  })
  .partial();
export type UpdateProject = z.infer<typeof updateProjectSchema>;

export const projectSchema = z.object({
  id: idSchema,
  name: z.string(),
  customer: z.string(),
  customerContact: z.string(),
  preparerMayIssue: z.boolean().describe('Whether who prepared a report may issue it too'),
  description: z.string(),
  defaultSettings: settingsSchema,
  comparisonLimitSetId: z.string().nullable(),
  archivedAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
  role: projectRoleSchema
    .nullable()
    .describe('Role of the person who asks; null for an administrator who is no member'),
  counts: z.object({
    recordings: z.number().int(),
    members: z.number().int(),
    reports: z.number().int(),
  }),
});
export type Project = z.infer<typeof projectSchema>;
export const projectPageSchema = pageOf(projectSchema);

export const projectQuerySchema = pageQuerySchema.extend({
  q: z.string().trim().max(200).optional().describe('Looks in name and customer'),
  archived: z
    .enum(['false', 'true', 'all'])
    .default('false')
    .describe('Archived projects: left out, alone, or too'),
});
export type ProjectQuery = z.infer<typeof projectQuerySchema>;

export const memberSchema = z.object({
  userId: idSchema,
  name: z.string(),
  email: z.string(),
  role: projectRoleSchema,
  addedAt: timestampSchema,
});
export type Member = z.infer<typeof memberSchema>;
export const memberPageSchema = pageOf(memberSchema);

export const addMemberSchema = z.object({
  email: z
    .email()
    .max(254)
    .transform((email) => email.toLowerCase()),
  role: projectRoleSchema,
});
export type AddMember = z.infer<typeof addMemberSchema>;

export const updateMemberSchema = z.object({ role: projectRoleSchema });
export type UpdateMember = z.infer<typeof updateMemberSchema>;
