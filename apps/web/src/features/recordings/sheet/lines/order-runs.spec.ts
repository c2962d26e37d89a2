import { expect, it } from 'vitest';
import { orderRuns } from './order-runs.js';

it('orders are told as runs where three or more stand together', () => {
  expect(orderRuns([1, 3, 5, 6, 7, 8, 11, 12])).toBe('1, 3, 5 to 8, 11, 12');
  expect(orderRuns([7, 5])).toBe('5, 7');
  expect(orderRuns([])).toBe('');
});
