import { describe, expect, it } from 'vitest';
import { previewRecording } from '../src/index.js';
import { fixture, readAll, readBad, readGood } from './support.js';

interface ComtradeCase {
  file: string;
  values: (number | null)[][];
}

// Written from the layout of IEEE C37.111-2013 (IEC 60255-24): fixtures/readers/make-comtrade.py.
const { cases } = JSON.parse(new TextDecoder().decode(fixture('comtrade-cases.json'))) as {
  cases: ComtradeCase[];
};

const ascii = new TextDecoder().decode(fixture('comtrade-ascii.cff'));
const codes = (reading: { warnings: { code: string }[] }) => reading.warnings.map(({ code }) => code);

/** A small record as text, in the layout of the standard; `change` edits its lines. */
function small(change: (lines: string[]) => string[] = (lines) => lines, year = 1999): string {
  const lines = [
    '--- file type: CFG ---',
    `Bench,R1,${year}`,
    '1,1A,0D',
    '1,U,A,,V,0.5,0,0,-99998,99998,1,1,P',
    '50',
    '1',
    '1000,4',
    '01/02/2024,00:00:00.000000',
    '01/02/2024,00:00:00.000000',
    'ASCII',
    '1',
    '--- file type: DAT ASCII ---',
    '1,0,2',
    '2,1000,4',
    '3,2000,6',
    '4,3000,8',
    '',
  ];
  return change(lines).join('\r\n');
}

const replace = (index: number, ...by: string[]) =>
  small((lines) => [...lines.slice(0, index), ...by, ...lines.slice(index + 1)]);

describe('COMTRADE records in one file', () => {
  it.each(cases.map((one) => [one.file, one] as const))(
    '%s has the values of its layout',
    async (name, one) => {
      const reading = await readGood(fixture(name), {}, name);
      expect(reading).toMatchObject({
        format: 'comtrade',
        sampleRateHz: 4800,
        sampleCount: 96,
        startTimeS: 0,
      });
      expect(reading.missingValues).toEqual([1, 0, 1]);
      expect(codes(reading)).toEqual(['missing-values', 'channel-skew', 'status-channels-left-out']);
      for (const [c, { gain, offset }] of reading.channels.entries()) {
        for (const [n, wanted] of (one.values[c] as (number | null)[]).entries()) {
          const raw = reading.samples[c]?.[n] as number;
          if (wanted === null) expect(raw).toBeNaN();
          else expect(gain * raw + offset).toBeCloseTo(wanted, 9);
        }
      }
    },
  );

  it('keeps stored numbers raw, with scaling in base units and the stated range', async () => {
    const { channels, samples } = await readGood(fixture('comtrade-binary.cff'));
    expect(samples[0]?.every((value) => Number.isNaN(value) || Number.isInteger(value))).toBe(true);
    expect(channels[0]).toMatchObject({ name: 'U A', unit: 'V', quantity: 'voltage', gain: 2, offset: 10 });
    expect(channels[1]).toMatchObject({ name: 'U B', lowestCode: -32767, highestCode: 32767 });
    expect(channels[2]).toMatchObject({
      name: 'I',
      quantity: 'current',
      lowestCode: -2047,
      highestCode: 2047,
    });
  });

  it('puts station, times, ratios and free text into the metadata', async () => {
    const { metadata } = await readGood(fixture('comtrade-binary.cff'));
    expect(metadata).toMatchObject({
      station: 'Substation 7',
      device: 'Recorder 3',
      revision: '2013',
      lineFrequencyHz: '50',
      startTime: '2024-06-25T19:13:57.789757',
      'U A ratio': '110 : 0.1, values are secondary',
      'I ratio': '600 : 0, values are primary',
      header: 'Fault on feeder 4',
      'info Source': 'bench',
    });
  });

  it('takes the rate from nanosecond stamps with a multiplier when no rate is stated', async () => {
    const reading = await readGood(fixture('comtrade-by-stamps.cff'));
    expect(reading.sampleRateHz / 4800).toBeCloseTo(1, 5);
    expect(codes(reading)).not.toContain('uneven-sampling');
    const size = fixture('comtrade-by-stamps.cff').length;
    const shown = await previewRecording(fixture('comtrade-by-stamps.cff'), {
      fileName: 'a.cff',
      sizeBytes: size,
    });
    expect((shown.sampleRateHz as number) / 4800).toBeCloseTo(1, 5);
  });

  it.each([1, 7, 4096])('%i bytes at a time give the same', async (size) => {
    for (const name of ['comtrade-ascii.cff', 'comtrade-float32.cff']) {
      expect(await readAll(fixture(name), {}, name, size)).toEqual(await readAll(fixture(name), {}, name));
    }
  });

  it('reads long text data across its windows', async () => {
    const count = 30000;
    const rows = Array.from({ length: count }, (_, i) => `${i + 1},${i * 1000},${i}`);
    const text = small((lines) => [
      ...lines.slice(0, 6),
      `1000,${count}`,
      ...lines.slice(7, 12),
      ...rows,
      '',
    ]);
    const reading = await readGood(text);
    expect(reading).toMatchObject({ sampleCount: count, warnings: [] });
    expect(reading.samples[0]).toEqual(Array.from({ length: count }, (_, i) => i));
  });

  it('lets the user choose channels, rate, unit and gain', async () => {
    const channels = [{ column: 'I', gain: 3, unit: 'mA' }];
    const reading = await readGood(fixture('comtrade-binary.cff'), { channels, sampleRateHz: 5000 });
    expect(reading.channels).toMatchObject([{ name: 'I', unit: 'A', gain: 0.003, offset: 0 }]);
    expect(codes(reading)).toEqual(['missing-values', 'channel-skew', 'sample-rate-differs']);
    expect(reading.sampleRateHz).toBe(5000);
  });

  it('reads the 1991 edition: month first, 99999 missing, fewer fields', async () => {
    const text = small(
      (lines) =>
        lines.map((line, i) =>
          i === 3
            ? '1,U,A,,V,0.5,0,0,-99998,99998'
            : i === 14
              ? '3,2000,99999'
              : i === 7
                ? '02/01/91,00:00:01.5'
                : line,
        ),
      1991,
    );
    const reading = await readGood(text);
    expect(reading.samples).toEqual([[2, 4, NaN, 8]]);
    expect(reading.metadata).toMatchObject({ startTime: '1991-02-01T00:00:01.5' });
  });

  it('says when the stamps run at another pace than the stated rate', async () => {
    const reading = await readGood(replace(6, '1200,4'));
    expect(reading.sampleRateHz).toBe(1200);
    expect(codes(reading)).toEqual(['time-stamps-differ']);
    const falling = await readGood(small().replace('3,2000', '3,0'));
    expect(falling.warnings).toMatchObject([{ code: 'time-stamps-differ', count: 1 }]);
    expect(falling.sampleRateHz).toBe(1000);
  });

  it.each([
    [
      'several sampling rates',
      replace(5, '2', '1000,2', '500,4').replace('\r\n1000,4\r\n', '\r\n'),
      'several-sampling-rates',
      /1000, 500/,
      6,
    ],
    ['a count of channels that is none', replace(2, '1,A,D'), 'bad-configuration', /Line 3/, 3],
    ['a factor that is no number', replace(3, '1,U,A,,V,big,0,0,0,1,1,1,P'), 'bad-configuration', /"big"/, 4],
    ['a type of data that is none', replace(9, 'PACKED'), 'bad-configuration', /PACKED/, 10],
    ['data of another type than stated', replace(9, 'BINARY'), 'data-type-differs', /ASCII/, 12],
    [
      'a configuration that ends early',
      small((l) => [...l.slice(0, 5), ...l.slice(11)]),
      'bad-configuration',
      /ends after/,
      5,
    ],
    ['data before the configuration', small((l) => l.slice(11)), 'no-configuration', /before any CFG/, 1],
    ['no data section', small((l) => l.slice(0, 11)), 'no-data-section', /no DAT/, undefined],
    ['no records', small((l) => l.slice(0, 12)), 'no-samples', /no samples/, undefined],
    ['one record', small((l) => [...l.slice(0, 13), '']), 'too-few-samples', /one sample/, undefined],
    ['a line with too few fields', replace(13, '2,1000'), 'wrong-field-count', /2 fields/, 14],
    [
      'only status channels',
      small((l) => ['', ...l.slice(0, 2), '1,0A,1D', '1,S,,,0', ...l.slice(4)].slice(1)),
      'no-channels',
      /status/,
      undefined,
    ],
    [
      'stamps that run backwards',
      replace(6, '0,4').replace('3,2000', '3,500'),
      'time-not-increasing',
      /Record 3/,
      undefined,
    ],
    ['a factor of zero', replace(3, '1,U,A,,V,0,0,0,0,1,1,1,P'), 'bad-scaling', /gain 0/, undefined],
  ])('refuses %s', async (_what, text, code, words, line) => {
    const problem = await readBad(text, {}, 'a.cff');
    expect(problem).toMatchObject({ code, message: expect.stringMatching(words) as string });
    expect(problem.line).toBe(line);
    expect(problem.cure).not.toBe('');
  });

  it('reads cut data as far as they go', async () => {
    const binary = fixture('comtrade-binary.cff');
    const reading = await readGood(binary.subarray(0, binary.length - 25));
    expect(reading.sampleCount).toBe(94);
    expect(reading.warnings[0]).toMatchObject({ code: 'truncated', samples: [94] });
    const text = await readGood(ascii.slice(0, -10));
    expect(text).toMatchObject({ sampleCount: 95 });
    expect(codes(text)).toContain('truncated');
  });

  it('takes a last line without line end for whole when it is the last sample', async () => {
    expect(await readGood(small().trimEnd())).toMatchObject({ sampleCount: 4, warnings: [] });
    const cut = await readGood(small().slice(0, small().indexOf('4,3000')).trimEnd());
    expect(cut).toMatchObject({ sampleCount: 2 });
  });

  it('shows the beginning, as the reader understands it', async () => {
    const bytes = fixture('comtrade-ascii.cff');
    const shown = await previewRecording(bytes, { fileName: 'a.cff', sizeBytes: bytes.length });
    expect(shown).toMatchObject({ sampleRateHz: 4800, problem: null, needs: [] });
    expect(shown.lines[1]).toBe('Substation 7,Recorder 3,2013');
    expect(shown.rows).toHaveLength(20);
    const { outcome, samples } = await readAll(bytes);
    expect(outcome).toMatchObject({ layout: shown.layout });
    expect(shown.rows[1]).toEqual(samples.map((values) => values[1]));
    expect(shown.rows[10]?.[0]).toBeNull();
  });
});

describe('one half of a COMTRADE record of two files', () => {
  const configuration = small((lines) => lines.slice(1, 11));
  const binary = fixture('comtrade-binary.cff');
  const data = binary.subarray(binary.length - 96 * 18);

  it.each([
    ['configuration', configuration, 'fault.cfg'],
    ['configuration under another name', configuration, 'fault.txt'],
    ['binary data', data, 'fault.dat'],
    ['data as text', '1,0,2\r\n2,1000,4\r\n3,2000,6\r\n', 'fault.dat'],
  ])('is refused with the way to make one file of both: %s', async (_what, content, name) => {
    const problem = await readBad(content, {}, name);
    expect(problem.code).toBe('comtrade-half');
    expect(problem.cure).toContain('--- file type: CFG ---');
    const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
    expect((await previewRecording(bytes, { fileName: name, sizeBytes: bytes.length })).problem).toEqual(
      problem,
    );
  });

  it('is no matter for tables that are named .dat', async () => {
    expect(await readGood('t,u\n0,1\n1,2\n2,3\n', {}, 'a.dat')).toMatchObject({ format: 'csv' });
    const asTable = await readGood('1,0,2\n2,1000,4\n3,2000,6\n', { sampleRateHz: 10 }, 'a.dat');
    expect(asTable).toMatchObject({ format: 'csv', sampleRateHz: 10 });
  });
});
