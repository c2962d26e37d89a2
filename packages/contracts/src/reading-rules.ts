import { z } from 'zod';
import { idSchema, personRefSchema, timestampSchema } from './common.js';
import { importOptionsSchema } from './recordings.js';

/** Import options of a project that are used for every new file they fit. */
const readingRule = {
  name: z.string().trim().min(1).max(80),
  fileNamePattern: z
    .string()
    .trim()
    .min(1)
    .max(200)
    .describe('File name without folder; * stands for any text, ? for one character; case does not matter'),
  columnNames: z
    .array(z.string().max(200))
    .max(512)
    .nullable()
    .describe('Names of the columns the file must have, in this order; null: any'),
  options: importOptionsSchema,
};

export const createReadingRuleSchema = z.strictObject({
  ...readingRule,
  columnNames: readingRule.columnNames.default(null),
});
export type CreateReadingRule = z.infer<typeof createReadingRuleSchema>;

export const updateReadingRuleSchema = z.strictObject(readingRule).partial();
export type UpdateReadingRule = z.infer<typeof updateReadingRuleSchema>;

export const readingRuleSchema = z.object({
  id: idSchema,
  projectId: idSchema,
  ...readingRule,
  recordingCount: z.number().int().describe('Recordings read by it'),
  createdBy: personRefSchema,
  createdAt: timestampSchema,
  updatedAt: timestampSchema,
});
export type ReadingRule = z.infer<typeof readingRuleSchema>;

/** All rules of a project, the one that is tried first on top. */
export const readingRuleListSchema = z.object({ items: z.array(readingRuleSchema), nextCursor: z.null() });
