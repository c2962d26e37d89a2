import { expect, it } from 'vitest';
import { gapsWithin, readingFlags } from './reading-flags.js';

const gap = {
  ...{ code: 'gap', message: 'The time jumps', count: 3, firstLine: 12, samples: [100, 250, 700] },
  ...{ value: 6, limit: 1.5, unit: 'sample intervals' },
};

it('makes a flag of a warning, with its places in seconds from the start of the span', () => {
  expect(readingFlags([gap], { first: 0, end: 1000 }, 1000)).toEqual([
    {
      code: 'gap',
      severity: 'warning',
      message: 'The time jumps',
      evidence: { count: 3, timesS: [0.1, 0.25, 0.7], value: 6, limit: 1.5, unit: 'sample intervals' },
    },
  ]);
});

it('counts what lies in the span, and says nothing where nothing does', () => {
  // The jump before sample 100 lies between the span and what comes before it.
  const [flag] = readingFlags([gap], { first: 100, end: 400 }, 1000);
  expect(flag?.evidence).toMatchObject({ count: 1, timesS: [0.15] });
  expect(readingFlags([gap], { first: 300, end: 600 }, 1000)).toEqual([]);
});

it('keeps warnings of earlier readings, which named no places', () => {
  const [flag] = readingFlags(
    [{ code: 'gap', message: 'The time jumps', count: 3, firstLine: 12 }],
    { first: 0, end: 1000 },
    1000,
  );
  expect(flag?.evidence).toEqual({ count: 3, timesS: [], value: null, limit: null, unit: null });
});

it('leaves out what does not touch the samples', () => {
  const warning = { code: 'columns-left-out', message: 'Columns were left out', count: 1 };
  expect(readingFlags([warning], { first: 0, end: 1000 }, 1000)).toEqual([]);
});

it('tells the engine the gaps within the span, counted from its first sample', () => {
  const uneven = { code: 'uneven-sampling', message: 'The steps wander', samples: [300] };
  expect(gapsWithin([gap, uneven], { first: 100, end: 700 })).toEqual([150]);
});
