import { describe, expect, it } from 'vitest';
import { type ImportOptions } from '../src/index.js';
import { readAll, readBad, readGood } from './support.js';
import { chunk, formatChunk, wavFile } from './wav-builder.js';

/** A table whose second column holds `values`, null where the cell is blank. */
const table = (values: (number | null)[]) =>
  `t (s),u (V),i (A)\n${values.map((value, n) => `${n / 1000},${value ?? ''},${n}`).join('\n')}\n`;
const bridge: ImportOptions = { missingValues: 'interpolate' };
const blanks = (count: number): null[] => Array.from({ length: count }, () => null);
const messageOf = (reading: { warnings: { code: string; message: string }[] }) =>
  reading.warnings.find(({ code }) => code === 'missing-values')?.message ?? '';

// What a straight line between two numbers passes through is worked out by hand.
describe('missing values', () => {
  const sparse = table([...blanks(2), 4, null, 8, ...blanks(3), 0, 5, null]);

  it('are kept, and the warning says how many, where and so', async () => {
    const reading = await readGood(sparse);
    expect(reading.samples[0]).toEqual([NaN, NaN, 4, NaN, 8, NaN, NaN, NaN, 0, 5, NaN]);
    expect(reading.missingValues).toEqual([7, 0]);
    expect(reading.warnings).toMatchObject([{ code: 'missing-values', count: 7, firstLine: 2 }]);
    expect(messageOf(reading)).toMatch(/7 cells hold no number, first at line 2\. .*kept as missing/);
  });

  it('are bridged by a straight line, at the ends by the nearest number', async () => {
    const reading = await readGood(sparse, bridge);
    expect(reading.samples[0]).toEqual([4, 4, 4, 6, 8, 6, 4, 2, 0, 5, 5]);
    expect(reading).toMatchObject({ missingValues: [0, 0], sampleCount: 11 });
    expect(messageOf(reading)).toMatch(/first at line 2\. .*straight line, 7 samples in all\.$/);
  });

  it.each([
    [10, 0],
    [11, 11],
  ])('in a run of %i leave %i missing', async (length, left) => {
    const reading = await readGood(table([0, ...blanks(length), 11, null, 13]), bridge);
    const wanted = Array.from({ length }, (_, i) => (left > 0 ? NaN : (11 * (i + 1)) / (length + 1)));
    const got = reading.samples[0] ?? [];
    expect(got.slice(1, length + 1)).toEqual(wanted);
    expect(got.slice(length + 1)).toEqual([11, 12, 13]);
    expect(reading.missingValues).toEqual([left, 0]);
    expect(/longer runs, 1 of them, stay missing/.test(messageOf(reading))).toBe(left > 0);
  });

  it('are bridged across blocks and in chunks of any size', async () => {
    const values = Array.from({ length: 40_000 }, (_, n) => (n % 16_384 < 3 && n > 3 ? null : n));
    const reading = await readGood(table(values), bridge);
    expect(reading.samples[0]).toEqual(values.map((_, n) => n));
    expect((await readAll(table(values), bridge, 'a.csv', 997)).samples).toEqual(reading.samples);
  });

  it('of a channel without any number stay missing', async () => {
    const reading = await readGood(table([...blanks(5)]), {
      ...bridge,
      channels: [{ column: 1 }, { column: 2 }],
    });
    expect(reading.samples).toEqual([blanks(5).map(() => NaN), [0, 1, 2, 3, 4]]);
    expect(reading.missingValues).toEqual([5, 0]);
  });

  it('are refused with line and column of the first', async () => {
    const problem = await readBad(table([1, 2, null, null, 3]), { missingValues: 'refuse' });
    expect(problem).toMatchObject({ code: 'missing-values', line: 4, column: 2 });
    expect(await readGood(table([1, 2, 3]), { missingValues: 'refuse' })).toMatchObject({ sampleCount: 3 });
  });

  it('of a float WAV are placed by sample, bridged and refused', async () => {
    const data = new Uint8Array(Float32Array.from([1, NaN, 3, Infinity, 5]).buffer);
    const wav = wavFile(formatChunk({ tag: 3, bits: 32 }), chunk('data', data));
    const kept = await readGood(wav);
    expect(kept.warnings).toMatchObject([{ code: 'missing-values', count: 2, samples: [1] }]);
    expect(messageOf(kept)).toMatch(/first sample 2 of channel "ch1"/);
    expect((await readGood(wav, bridge)).samples).toEqual([[1, 2, 3, 4, 5]]);
    const problem = await readBad(wav, { missingValues: 'refuse' });
    expect(problem).toMatchObject({ code: 'missing-values' });
    expect(problem.message).toContain('Sample 2 of channel "ch1"');
  });
});
