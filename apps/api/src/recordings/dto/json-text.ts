import { z } from 'zod';

/** JSON as the text of a form field, checked by `schema`; an empty text counts as absent. */
export function jsonText<T extends z.ZodType>(schema: T) {
  return z
    .string()
    .transform((text, context): unknown => {
      if (text.trim() === '') return undefined;
      try {
        return JSON.parse(text);
      } catch (error) {
        context.addIssue({ code: 'custom', message: `Not JSON: ${(error as Error).message}` });
        return z.NEVER;
      }
    })
    .pipe(schema.optional());
}
