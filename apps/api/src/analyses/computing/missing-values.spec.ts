import { expect, it } from 'vitest';
import { missingValuesProblem } from './missing-values.js';

it('finds nothing to say about a whole record', () => {
  expect(missingValuesProblem('u', Float64Array.of(1, 2, 3), 0, 10)).toBeNull();
});

it('counts the gaps, places the first and names the longest span without', () => {
  const samples = Float64Array.of(1, NaN, 3, 4, 5, NaN, 7);
  const problem = missingValuesProblem('u', samples, 10, 10);
  expect(problem).toMatchObject({ code: 'missing-values' });
  // Index 1 of the part is sample 12 of the record, 1.1 s after its first.
  expect(problem?.message).toBe('2 values are missing in channel “u”, the first at sample 12 (1.1 s).');
  expect(problem?.cure).toContain('from 1.2 s to 1.5 s');
});

it('has no span to offer where hardly a value is left', () => {
  expect(missingValuesProblem('u', Float64Array.of(NaN, 1, NaN), 0, 10)?.cure).toMatch(/capture again/);
});
