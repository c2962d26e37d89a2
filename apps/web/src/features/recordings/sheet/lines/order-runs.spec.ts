import { expect, it } from 'vitest';
import { orderRuns } from './order-runs.js';

it('orders are told as runs where several stand together', () => {
  expect(orderRuns([1, 3, 5, 6, 7, 8, 11, 12])).toBe('1, 3, 5 to 8, 11, 12');
  expect(orderRuns([7, 5])).toBe('5, 7');
  expect(orderRuns([])).toBe('');
});

it('odd or even orders in a row are a run too', () => {
  expect(orderRuns(Array.from({ length: 20 }, (_, i) => 2 * i + 1))).toBe('1, 3 … 39');
  expect(orderRuns([1, 2, 3, 4, 6, 10, 14])).toBe('1 to 4, 6, 10, 14');
  expect(orderRuns([1, 5, 7, 11, 13])).toBe('1, 5, 7, 11, 13');
});
