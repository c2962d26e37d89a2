import { z } from 'zod';
import { problem } from './problem.js';

/** The place after which a page begins, as text that callers pass back unread. */
export function encodeCursor(place: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(place)).toString('base64url');
}

/**
 * Reads a cursor made by `encodeCursor`.
 * @param shape a zod tuple of the place's parts
 * @throws a 400 problem for text that is no cursor of this list
 */
export function decodeCursor<T extends z.ZodType>(
  cursor: string | undefined,
  shape: T,
): z.output<T> | undefined {
  if (cursor === undefined) return undefined;
  const parsed = shape.safeParse(parseJson(Buffer.from(cursor, 'base64url').toString('utf8')));
  if (parsed.success) return parsed.data;
  const message = 'Pass the nextCursor of the page before, of the same list with the same order';
  throw problem(400, 'invalid-request', 'The cursor does not belong to this list', [
    { path: 'cursor', message },
  ]);
}

/**
 * Cuts a page from rows fetched with `limit + 1`.
 * @param place gives the cursor parts of a row, in the order of sorting
 */
export function pageOfRows<Row, Item>(
  rows: Row[],
  limit: number,
  place: (row: Row) => readonly (string | number)[],
  toItem: (row: Row) => Item,
): { items: Item[]; nextCursor: string | null } {
  const kept = rows.slice(0, limit);
  const last = kept.at(-1);
  const nextCursor = rows.length > limit && last !== undefined ? encodeCursor(place(last)) : null;
  return { items: kept.map(toItem), nextCursor };
}

/** Escapes a person's words for use inside a LIKE pattern. */
export function likePattern(words: string): string {
  return `%${words.replace(/[\\%_]/g, (character) => `\\${character}`)}%`;
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}
