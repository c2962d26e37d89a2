import { describe, expect, it } from 'vitest';
import { readBad, readGood } from './support.js';

const rows = (row: (n: number) => string, count = 30) =>
  `${Array.from({ length: count }, (_, n) => row(n)).join('\n')}\n`;
const swing = (n: number) => (n % 7) - 3;

// What a cell means is how it was made; the sample interval is a millisecond throughout.
describe('engineering notation', () => {
  const wanted = Array.from({ length: 30 }, (_, n) => 1000 * swing(n));

  it.each([
    ['with E', 'time (s),u (V)\n', (n: number) => `${n}.000E-03,${swing(n).toFixed(3)}e+03`],
    ['with decimal commas', 'time (s);u (V)\n', (n: number) => `${n},000E-03;${swing(n)},000E+03`],
    ['with D, between blanks', 'time (s)  u (V)\n', (n: number) => ` ${n}.000D-03   ${swing(n)}.000D+03`],
    ['in quotes', '"time (s)","u (V)"\n', (n: number) => `"${n}E-3","${swing(n)}E3"`],
  ])('is read %s', async (_, header, row) => {
    const reading = await readGood(header + rows(row));
    expect(reading.channels).toMatchObject([{ name: 'u', unit: 'V', gain: 1 }]);
    expect(reading.samples).toEqual([wanted]);
    expect(reading.sampleRateHz).toBeCloseTo(1000, 6);
  });
});

describe('several hundred columns', () => {
  it.each([300, 512])('are read: %i of them', async (count) => {
    const header = ['time (s)', ...Array.from({ length: count }, (_, k) => `ch${k} (mV)`)].join(',');
    const row = (n: number) => [n / 1000, ...Array.from({ length: count }, (_, k) => k + n / 100)].join(',');
    const reading = await readGood(`${header}\n${rows(row, 150)}`);
    expect(reading).toMatchObject({ sampleCount: 150, warnings: [] });
    expect(reading.channels).toHaveLength(count);
    expect(reading.channels.at(-1)).toMatchObject({ name: `ch${count - 1}`, unit: 'V', gain: 1e-3 });
    for (const k of [0, 1, count - 1])
      expect(reading.samples[k]).toEqual(Array.from({ length: 150 }, (_, n) => k + n / 100));
  });
});

describe('thousands marks', () => {
  it.each([
    ['commas between tabs', 'time (s)\tu (V)\n', (n: number) => `0.${100 + n}\t${n + 1},${100 + n}.5`],
    ['commas in quotes', 'time (s),u (V)\n', (n: number) => `0.${100 + n},"${n + 1},${100 + n}"`],
    ['blanks', 'time (s);u (V)\n', (n: number) => `0.${100 + n};${n + 1} ${100 + n}`],
    ['narrow blanks', 'time (s);u (V)\n', (n: number) => `0.${100 + n};${n + 1}\u202f${100 + n}`],
    ['apostrophes', 'time (s);u (V)\n', (n: number) => `0.${100 + n};${n + 1}'${100 + n}.25`],
    ['points beside decimal commas', 'time (s);u (V)\n', (n: number) => `0,${100 + n};${n + 1}.${100 + n},5`],
    [
      'commas beside numbers below a thousand',
      'time (ms);n\n',
      (n: number) => `${n};${n < 9 ? n : `1,${100 + n}`}`,
    ],
  ])('are refused by line and column: %s', async (_, header, row) => {
    const problem = await readBad(header + rows(row));
    expect(problem).toMatchObject({ code: 'thousands-separator', column: 2 });
    expect(problem.line).toBeGreaterThan(1);
  });

  it('that may be decimal commas of three digits are doubted, unless the mark is stated', async () => {
    const text = `time (ms);u (V)\n${rows((n) => `${n};${n + 225},${100 + n}`)}`;
    const reading = await readGood(text);
    expect(reading.samples[0]?.[0]).toBe(225.1);
    expect(reading.layout.doubts.join(' ')).toMatch(/Every comma stands before three digits/);
    expect((await readGood(text, { decimal: ',' })).layout.doubts).toEqual([]);
  });
});

it('refuses FLAC by name, with a cure', async () => {
  const problem = await readBad(new TextEncoder().encode('fLaC\u0000\u0000\u0000\u0022'), {}, 'a.flac');
  expect(problem).toMatchObject({ code: 'not-a-capture' });
  expect(problem.message).toContain('FLAC');
  expect(problem.cure).toContain('WAV');
});
