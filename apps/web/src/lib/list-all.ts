import type { z } from 'zod';
import { requestJson, type RequestOptions } from './http.js';

type PageSchema<T> = z.ZodType<{ items: T[]; nextCursor: string | null }>;

/** Fetches every page of a list that is short by nature (projects, members, limit sets). */
export async function listAll<T>(
  schema: PageSchema<T>,
  path: string,
  options: Pick<RequestOptions, 'query' | 'signal'> = {},
): Promise<T[]> {
  const items: T[] = [];
  let cursor: string | null = null;
  do {
    const page: { items: T[]; nextCursor: string | null } = await requestJson(schema, path, {
      ...options,
      query: { ...options.query, limit: 200, cursor },
    });
    items.push(...page.items);
    cursor = page.nextCursor;
  } while (cursor !== null);
  return items;
}
