import { describe, expect, it } from 'vitest';
import { readBad, readGood } from './support.js';

/** A table of `count` rows at 1 kHz; `edit` may change the lines. Line 1 is the header. */
function table(count: number, edit: (lines: string[]) => void = () => undefined): string {
  const lines = [
    't [s],u [V]',
    ...Array.from({ length: count }, (_, i) => `${(i / 1000).toFixed(3)},${i}.5`),
  ];
  edit(lines);
  return `${lines.join('\n')}\n`;
}

const codes = (read: { warnings: { code: string }[] }) => read.warnings.map(({ code }) => code);

// The rules are those of fixtures/readers/SOURCE.md; here at their edges.
describe('time stamps', () => {
  it('names the line and column where the time runs backwards', async () => {
    const problem = await readBad(table(10, (lines) => (lines[5] = '0.001,1')));
    expect(problem).toMatchObject({ code: 'time-not-increasing', line: 6, column: 1 });
    expect(problem.message).toContain('0.001 s after 0.003 s');
  });

  it.each([
    [0.08, ['uneven-sampling']],
    [0.009, []],
  ])('off by %d of the interval give the warnings %j', async (off, warnings) => {
    const rows = Array.from(
      { length: 40 },
      (_, i) => `${((i + (i % 3 === 1 ? off : 0)) / 1000).toFixed(7)},${i}`,
    );
    const read = await readGood(`t,u\n${rows.join('\n')}\n`);
    expect(codes(read)).toEqual(warnings);
    for (const { samples, value } of read.warnings) {
      // Every third stamp is late: the step to it is long, the one after it short. Twenty places are named.
      expect(samples).toEqual(Array.from({ length: 20 }, (_, i) => 1 + 3 * (i >> 1) + (i % 2)));
      expect(value).toBeCloseTo(100 * off, 3);
    }
  });

  it('keeps the rate of the regular intervals over a gap, and says where it is', async () => {
    const read = await readGood(table(50, (lines) => lines.splice(20, 5)));
    expect(read.sampleRateHz).toBeCloseTo(1000, 6);
    // Rows 19 to 23 are gone: the next one, sample 19 now, comes six intervals after the one before.
    expect(read.warnings).toEqual([
      expect.objectContaining({
        ...{ code: 'gap', count: 1, firstLine: 21, samples: [19] },
        ...{ value: expect.closeTo(6, 6), limit: 1.5, unit: 'sample intervals' },
      }),
    ]);
  });

  it('loses nothing of stamps in milliseconds since 1970', async () => {
    const rows = Array.from({ length: 10 }, (_, i) => `${1711015200000 + i},${i}`);
    expect((await readGood(`epoch_ms,u_V\n${rows.join('\n')}\n`)).sampleRateHz).toBeCloseTo(1000, 9);
  });

  it('keeps a row whose time is missing', async () => {
    const read = await readGood(table(10, (lines) => (lines[4] = ',7')));
    expect(read.sampleCount).toBe(10);
    expect(read.sampleRateHz).toBeCloseTo(1000, 6);
    expect(read.warnings).toEqual([
      expect.objectContaining({
        ...{ code: 'missing-values', count: 1, firstLine: 5 },
        message: '1 cell holds no number, at line 5. What is missing is kept as missing, not as zero.',
      }),
    ]);
  });

  it('refuses a word in place of a time', async () => {
    expect(await readBad(table(10, (lines) => (lines[4] = 'soon,7')))).toMatchObject({
      code: 'bad-time-stamp',
      line: 5,
    });
  });

  it('reads calendar stamps', async () => {
    const rows = [0, 1, 2, 3].map((i) => `2024-03-21 10:00:00.${i}00,${i}`);
    const read = await readGood(`Date,u_V\n${rows.join('\n')}\n`);
    expect(read.sampleRateHz).toBeCloseTo(10, 6);
    expect(read.metadata.startTime).toBe('2024-03-21 10:00:00.000');
  });

  it('takes an unnamed first column in equal steps as time, with a doubt', async () => {
    const read = await readGood(['0,1', '0.1,4', '0.2,2', '0.3,5', ''].join('\n'));
    expect(read.sampleRateHz).toBeCloseTo(10, 6);
    expect(read.layout).toMatchObject({ timeColumn: 0, confident: false });
  });

  it('does not take a counter as time', async () => {
    expect((await readBad('0,1.5\n1,2.5\n2,1.5\n3,7.5\n')).code).toBe('needs-sample-rate');
    const read = await readGood('No,u_V\n0,1.5\n1,2.5\n2,1.5\n3,7.5\n', { sampleRateHz: 50 });
    expect(read.samples).toEqual([[1.5, 2.5, 1.5, 7.5]]);
  });
});

describe('cells', () => {
  it.each([
    ['1.234,5', ';', { decimal: ',' as const }],
    ['"1,234.5"', ',', {}],
    ['1 234.5', ';', {}],
    ["1'234.5", ',', {}],
  ])('refuses the thousands separator of %s', async (cell, delimiter, options) => {
    const mark = 'decimal' in options ? ',' : '.';
    const rows = [0, 1, 2, 3].map((i) => `0${mark}${i}${delimiter}2${mark}5`);
    const problem = await readBad(
      `t;u\n${rows.join('\n')}\n0${mark}4${delimiter}${cell}\n`.replace(';', delimiter),
      options,
    );
    expect(problem).toMatchObject({ code: 'thousands-separator', line: 6, column: 2 });
  });

  it('refuses a row that a thousands separator has split', async () => {
    const problem = await readBad(table(10, (lines) => (lines[7] = '0.006,1,234.5')));
    expect(problem).toMatchObject({ code: 'too-many-cells', line: 8 });
  });

  it('refuses decimal commas between comma cells', async () => {
    const problem = await readBad('t,u,i\n0,0,1,5,2,5\n0,1,1,6,2,6\n0,2,1,7,2,7\n0,3,1,8,2,8\n');
    expect(problem.code).toBe('ambiguous-delimiter');
  });

  it('refuses a change of the decimal mark', async () => {
    const problem = await readBad('t;u\n0.0;1.5\n0.1;1.5\n0.2;1.5\n0.3;1.5\n0.4;1,5\n');
    expect(problem).toMatchObject({ code: 'mixed-decimal-marks', line: 6, column: 2 });
  });

  it('reads quoted numbers, also with decimal commas', async () => {
    const read = await readGood('"t","u"\n"0,0","1,5"\n"0,1","2,5"\n"0,2","3,5"\n"0,3","-4,5"\n');
    expect(read.samples).toEqual([[1.5, 2.5, 3.5, -4.5]]);
    expect(read.sampleRateHz).toBeCloseTo(10, 6);
  });

  it('keeps values exact to the last digit', async () => {
    const values = ['0.1', '123456789012345678', '1e-320', '-2.2250738585072014e-308', '3.141592653589793'];
    const read = await readGood(`u_V\n${values.join('\n')}\n`, { sampleRateHz: 1 });
    expect(read.samples[0]).toEqual(values.map(Number));
  });

  it('counts missing cells per channel and keeps them as NaN', async () => {
    const read = await readGood('t,u,i\n0,1,\n0.1,NaN,2\n0.2,ovl,3\n0.3,4,4\n');
    expect(read.samples).toEqual([
      [1, NaN, NaN, 4],
      [NaN, 2, 3, 4],
    ]);
    expect(read.missingValues).toEqual([2, 1]);
  });

  it.each([
    ['space', 't u\n0.0 1\n0.1  2\n 0.2 3\n0.3\t4\n'],
    ['bar', 't|u\n0.0|1\n0.1|2\n0.2| 3\n0.3|4\n'],
  ])('reads cells with a %s between them', async (_name, text) => {
    expect((await readGood(text)).samples).toEqual([[1, 2, 3, 4]]);
  });
});

describe('lines', () => {
  it.each([
    ['in the middle of a number of fixed digits', '0.010,12.50\n0.011,11.50\n0.012,1', 1],
    ['after a delimiter', '0.010,12.50\n0.011,11.50\n0.012,', 1],
    ['nowhere: the line is whole', '0.010,12.50\n0.011,11.50\n0.012,10.50', 0],
  ])('that end %s', async (_where, end, cut) => {
    const read = await readGood(`t,u\n0.008,14.50\n0.009,13.50\n${end}`);
    expect(codes(read)).toEqual(cut === 1 ? ['partial-row'] : []);
    expect(read.sampleCount).toBe(5 - cut);
  });

  it('of text after the numbers are left, in the middle they are refused', async () => {
    expect(codes(await readGood(`${table(10)}End of record\n`))).toEqual(['trailing-text']);
    const problem = await readBad(table(10, (lines) => lines.splice(5, 0, 'Trigger')));
    expect(problem).toMatchObject({ code: 'text-in-data', line: 6 });
  });

  it('of statistics behind the record are left', async () => {
    const read = await readGood(`${table(10)}\nStatistics\nMax,9.5\nMin,0.5\n`);
    expect([read.sampleCount, codes(read)]).toEqual([10, ['trailing-text']]);
  });

  it('with a cell too many are refused, blank cells before it or not', async () => {
    const problem = await readBad(table(10, (lines) => (lines[7] = '0.006,,3')));
    expect(problem).toMatchObject({ code: 'too-many-cells', line: 8, column: 3 });
  });

  it('with a date, a clock and a state between the values', async () => {
    const rows = Array.from({ length: 8 }, (_, i) => `2024-03-21,10:00:00.${i}00,${i},OK`);
    const read = await readGood(`Date,Time,U [V],State\n${rows.join('\n')}\n`);
    expect(read.sampleRateHz).toBeCloseTo(10, 6);
    expect(read.channels.map(({ name }) => name)).toEqual(['U']);
    expect(codes(read)).toEqual(['columns-left-out']);
  });

  it('before the table give metadata and, without a time column, the rate', async () => {
    const read = await readGood('Model: R7\nSample Interval,1e-3\n\nu_mV,i_A\n1,2\n2,3\n4,5\n4,6\n');
    expect(read.sampleRateHz).toBeCloseTo(1000, 6);
    expect(read.metadata).toMatchObject({ Model: 'R7', 'Sample Interval': '1e-3' });
    expect(read.channels.map(({ unit, gain }) => [unit, gain])).toEqual([
      ['V', 1e-3],
      ['A', 1],
    ]);
  });

  it('of oscilloscopes with names, units and a blank line', async () => {
    const read = await readGood('Time,Channel A\n(ms),(mV)\n\n0.0,1\n0.5,2\n1.0,3\n1.5,4\n');
    expect(read.sampleRateHz).toBeCloseTo(2000, 6);
    expect(read.layout).toMatchObject({ headerRows: 3, unitsRow: 2, timeUnit: 'ms' });
    expect(read.channels[0]).toMatchObject({ name: 'Channel A', unit: 'V', gain: 1e-3, quantity: 'voltage' });
  });

  it('in UTF-16, big end first, without a byte order mark', async () => {
    const text = table(20);
    const bytes = new Uint8Array(text.length * 2);
    for (let i = 0; i < text.length; i += 1) bytes[2 * i + 1] = text.charCodeAt(i);
    expect((await readGood(bytes)).layout.encoding).toBe('utf-16be');
  });
});

describe('the beginning of the numbers', () => {
  it('stands at the first of them, even where text follows soon', async () => {
    const problem = await readBad(table(10, (lines) => lines.splice(3, 0, 'Trigger')));
    expect(problem).toMatchObject({ code: 'text-in-data', line: 4 });
  });

  it('may hold missing values only', async () => {
    const read = await readGood('u,i\nNaN,NaN\n1,2\n3,4\n5,6\n7,8\n', { sampleRateHz: 10 });
    expect(read.samples[0]).toEqual([NaN, 1, 3, 5, 7]);
    expect(read.channels.map(({ name }) => name)).toEqual(['u', 'i']);
  });

  it('is where the options put it', async () => {
    const read = await readGood('1,2\n3,4\n5,6\n7,8\n', { headerRows: 1, sampleRateHz: 10 });
    expect(read.samples[0]).toEqual([3, 5, 7]);
  });
});

describe('commas that may be either', () => {
  it('are decimal marks where the header names one column', async () => {
    const read = await readGood('u_V\n0,5\n0,7\n-1,5\n2,5\n', { sampleRateHz: 10 });
    expect(read.samples).toEqual([[0.5, 0.7, -1.5, 2.5]]);
  });

  it('stand between the cells where it names two', async () => {
    const read = await readGood('u_V,i_A\n0,5\n0,7\n,5\n2,5\n', { sampleRateHz: 10 });
    expect(read.samples).toHaveLength(2);
    expect(read.layout.confident).toBe(true);
  });

  it('leave a doubt without a header', async () => {
    const read = await readGood('0,5\n0,7\n-1,5\n2,5\n', { sampleRateHz: 10 });
    expect(read.layout.confident).toBe(false);
  });
});

describe('options', () => {
  it('select, name and scale columns', async () => {
    const channels = [
      { column: 'U [kV]', name: 'supply', gain: 2 },
      { column: 2, unit: 'mA', offset: 5 },
    ];
    const read = await readGood('t,U [kV],x\n0,1,10\n0.1,2,20\n0.2,3,30\n', { channels });
    expect(read.samples).toEqual([
      [1, 2, 3],
      [10, 20, 30],
    ]);
    expect(read.channels[0]).toMatchObject({ name: 'supply', unit: 'V', gain: 2000, offset: 0 });
    expect(read.channels[1]).toMatchObject({
      name: 'x',
      unit: 'A',
      gain: 1e-3,
      offset: 5e-3,
      quantity: 'current',
    });
  });

  it('give the rate precedence over the time column, with a warning beyond 1 %', async () => {
    expect(codes(await readGood(table(10), { sampleRateHz: 1005 }))).toEqual([]);
    const read = await readGood(table(10), { sampleRateHz: 1100 });
    expect([read.sampleRateHz, codes(read)]).toEqual([1100, ['sample-rate-differs']]);
  });

  it('set a useless time column aside', async () => {
    const text = 'time,u\n0.00,1\n0.00,2\n0.01,3\n0.01,4\n';
    expect((await readBad(text)).code).toBe('time-repeated');
    expect((await readGood(text, { timeColumn: null, sampleRateHz: 200 })).samples).toEqual([[1, 2, 3, 4]]);
  });

  it('name the time column and its unit', async () => {
    const read = await readGood('u,clock\n5,0\n6,10\n5,20\n4,30\n', { timeColumn: 'clock', timeUnit: 'us' });
    expect(read.sampleRateHz).toBeCloseTo(1e5, 3);
  });

  it('that do not fit are refused with the columns there are', async () => {
    const problem = await readBad(table(5), { channels: [{ column: 'i' }] });
    expect(problem.code).toBe('unknown-column');
    expect(problem.message).toContain('1 "u"');
    expect((await readBad(table(5), { delimiter: ';', decimal: ',' })).code).toBe('options-do-not-fit');
    expect((await readBad(table(5), { sampleRateHz: 0 })).code).toBe('bad-sample-rate');
    expect((await readBad(table(5), { channels: [{ column: 1, gain: 0 }] })).code).toBe('bad-scaling');
  });
});

describe('content decides the format', () => {
  it('reads a table named .wav', async () => {
    expect((await readGood(table(5), {}, 'table.wav')).format).toBe('csv');
  });

  it.each([
    ['PK\u0003\u0004rest', 'spreadsheet'],
    ['%PDF-1.7', 'PDF'],
  ])('names other kinds of file', async (start, what) => {
    const problem = await readBad(start);
    expect(problem).toMatchObject({ code: 'not-a-capture' });
    expect(problem.message).toContain(what);
  });
});
