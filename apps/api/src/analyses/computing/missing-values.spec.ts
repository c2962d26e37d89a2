import { expect, it } from 'vitest';
import { MissingValues } from './missing-values.js';

/** The problem after samples that came in blocks of two. */
function problemOf(samples: number[], first = 0) {
  const values = new MissingValues();
  for (let at = 0; at < samples.length; at += 2) values.add(Float64Array.from(samples.slice(at, at + 2)));
  return values.problem('u', first, 10);
}

it('finds nothing to say about a whole record', () => {
  expect(problemOf([1, 2, 3])).toBeNull();
});

it('counts the gaps, places the first and names the longest span without', () => {
  const problem = problemOf([1, NaN, 3, 4, 5, NaN, 7], 10);
  expect(problem).toMatchObject({ code: 'missing-values' });
  // Index 1 of the part is sample 12 of the record, 1.1 s after its first.
  expect(problem?.message).toBe('2 values are missing in channel “u”, the first at sample 12 (1.1 s).');
  expect(problem?.cure).toContain('from 1.2 s to 1.5 s');
});

it('has no span to offer where hardly a value is left', () => {
  expect(problemOf([NaN, 1, NaN])?.cure).toMatch(/capture again/);
});
