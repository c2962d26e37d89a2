import { z } from 'zod';

/** What a rule is called and which files it is for, as its forms hold it. */
export const ruleFieldsSchema = z.object({
  name: z.string().trim().min(1, 'Name the rule').max(80, 'Use at most 80 characters'),
  fileNamePattern: z
    .string()
    .trim()
    .min(1, 'Give a pattern; * alone fits every file')
    .max(200, 'Use at most 200 characters')
    .refine((pattern) => !/[\\/]/.test(pattern), { message: 'Leave folders out: only the name counts' }),
  bindsColumns: z.boolean(),
});
export type RuleFields = z.infer<typeof ruleFieldsSchema>;
