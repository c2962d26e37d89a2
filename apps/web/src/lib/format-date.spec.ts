import { expect, it } from 'vitest';
import { formatDate, formatDateTime } from './format-date.js';

const here = { locale: 'en-GB', timeZone: 'Europe/Oslo' };

it('shows a moment in the form and zone of the reader (13:20 UTC is 14:20 in Oslo in winter)', () => {
  expect(formatDateTime('2026-11-26T13:20:00Z', here)).toBe('26 Nov 2026, 14:20');
});

it('shows the day the reader has', () => {
  expect(formatDate('2026-11-26T23:30:00Z', here)).toBe('27 Nov 2026');
});

it('shows a dash for a moment that is not known', () => {
  expect(formatDate(null, here)).toBe('–');
});
