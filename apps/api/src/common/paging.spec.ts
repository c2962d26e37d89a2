import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { decodeCursor, encodeCursor, likePattern, pageOfRows } from './paging.js';

const place = z.tuple([z.string(), z.number()]);
const toPlace = (row: { name: string; number: number }) => [row.name, row.number] as const;
const rows = ['a', 'b', 'c'].map((name, number) => ({ name, number }));

describe('a cursor', () => {
  it('comes back as it went out', () => {
    expect(decodeCursor(encodeCursor(['Ω "x"', -1.5]), place)).toEqual(['Ω "x"', -1.5]);
  });

  it('is optional', () => {
    expect(decodeCursor(undefined, place)).toBeUndefined();
  });

  it.each(['', 'nonsense', encodeCursor(['only one part']), encodeCursor([1, 'turned round'])])(
    'of another shape is refused: %j',
    (cursor) => {
      expect(() => decodeCursor(cursor, place)).toThrow('does not belong to this list');
    },
  );
});

describe('a page', () => {
  it('points behind its last row while more follow', () => {
    const page = pageOfRows(rows, 2, toPlace, (row) => row.name);
    expect(page.items).toEqual(['a', 'b']);
    expect(decodeCursor(page.nextCursor ?? undefined, place)).toEqual(['b', 1]);
  });

  it('is the last when exactly as many rows are there as it holds', () => {
    expect(pageOfRows(rows, 3, toPlace, (row) => row.name).nextCursor).toBeNull();
    expect(pageOfRows([], 3, toPlace, (row) => row).nextCursor).toBeNull();
  });
});

describe('a search pattern', () => {
  it('takes wildcards of the person as letters', () => {
    expect(likePattern('100%_\\')).toBe('%100\\%\\_\\\\%');
  });
});
