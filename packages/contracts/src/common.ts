import { z } from 'zod';

/** Identifier of a stored thing (UUID), in lower case as it is stored. */
export const idSchema = z.uuid().toLowerCase().describe('Identifier, a UUID');

/** Highest index of a channel that a request may name; recordings have fewer channels. */
export const maxChannelIndex = 1023;

/** Moment in UTC as ISO 8601. */
export const timestampSchema = z.iso.datetime({ offset: true }).describe('Moment, ISO 8601 UTC');

/** One page of a list; `nextCursor` is null on the last page. */
export const pageOf = <T extends z.ZodType>(item: T) =>
  z.object({
    items: z.array(item),
    nextCursor: z.string().nullable().describe('Pass as `cursor` to get the next page; null at the end'),
  });

/** Paging parameters of every list. */
export const pageQuerySchema = z.object({
  cursor: z.string().max(2000).optional().describe('`nextCursor` of the page before'),
  limit: z.coerce.number().int().min(1).max(200).default(50).describe('Items per page'),
});

/** Problem details, RFC 9457, media type application/problem+json. */
export const problemDetailsSchema = z.object({
  type: z
    .string()
    .describe('URI reference of the kind of problem, `about:blank` when the status says it all'),
  title: z.string(),
  status: z.number().int(),
  detail: z.string().optional().describe('What happened and what to do about it'),
  instance: z.string().optional().describe('Request id, for the log'),
  code: z.string().optional().describe('Stable code for programs'),
  errors: z
    .array(z.object({ path: z.string(), message: z.string() }))
    .optional()
    .describe('One entry per invalid field'),
});
export type ProblemDetails = z.infer<typeof problemDetailsSchema>;

/** Who did something, as shown beside it. */
export const personRefSchema = z.object({ id: idSchema, name: z.string() });
export type PersonRef = z.infer<typeof personRefSchema>;
