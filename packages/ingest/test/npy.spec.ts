import { describe, expect, it } from 'vitest';
import { previewRecording } from '../src/index.js';
import { fixture, readAll, readBad, readGood } from './support.js';

interface NpyCase {
  file: string;
  type: string;
  channels: number[][];
}

// Written and read back with NumPy 1.24: fixtures/readers/make-npy.py.
const { cases } = JSON.parse(new TextDecoder().decode(fixture('npy-cases.json'))) as { cases: NpyCase[] };
const rate = { sampleRateHz: 10000 };

/** An .npy file of version 1.0 as NumPy's documentation of numpy.lib.format lays it out. */
function npy(dictionary: string, data: number[] = []): Uint8Array {
  const text = new TextEncoder().encode(`${dictionary}\n`);
  return Uint8Array.from([
    0x93,
    ...new TextEncoder().encode('NUMPY'),
    1,
    0,
    text.length & 255,
    text.length >> 8,
    ...text,
    ...data,
  ]);
}

const dictionary = (descr: string, shape: string, order = 'False') =>
  `{'descr': ${descr}, 'fortran_order': ${order}, 'shape': ${shape}, }`;

describe('.npy files', () => {
  it.each(cases.map((one) => [one.file, one] as const))(
    '%s has the values NumPy reads',
    async (name, one) => {
      const reading = await readGood(fixture(name), rate, name);
      expect(reading).toMatchObject({ format: 'npy', sampleRateHz: 10000, warnings: [], startTimeS: null });
      expect(reading.layout.sampleFormat).toBe(one.type);
      expect(reading.samples).toEqual(one.channels);
    },
  );

  it.each([1, 7, 1000])('%i bytes at a time give the same', async (size) => {
    for (const name of ['npy-fortran-order.npy', 'npy-i2-big.npy']) {
      expect(await readAll(fixture(name), rate, name, size)).toEqual(
        await readAll(fixture(name), rate, name),
      );
    }
  });

  it('knows the ends of integer codes', async () => {
    const { channels } = await readGood(fixture('npy-u1-little.npy'), rate);
    expect(channels[0]).toMatchObject({ gain: 1, offset: 0, lowestCode: 0, highestCode: 255 });
    const floats = await readGood(fixture('npy-f4-little.npy'), rate);
    expect(floats.channels[0]).toMatchObject({ lowestCode: null, highestCode: null });
  });

  it('says which side was taken as the samples', async () => {
    const { layout } = await readGood(fixture('npy-channels-by-samples.npy'), rate);
    expect(layout.confident).toBe(false);
    expect(layout.doubts[0]).toContain('3 rows and 50 columns');
    expect((await readGood(fixture('npy-one-dimension.npy'), rate)).layout.confident).toBe(true);
  });

  it('reads the channels that were chosen, with unit and gain', async () => {
    const channels = [{ column: 2, unit: 'mV', gain: 2, name: 'supply' }];
    const reading = await readGood(fixture('npy-fortran-order.npy'), { ...rate, channels });
    const wanted = cases.find(({ file }) => file === 'npy-fortran-order.npy')?.channels[2];
    expect(reading.samples).toEqual([wanted]);
    expect(reading.channels[0]).toMatchObject({
      name: 'supply',
      unit: 'V',
      quantity: 'voltage',
      gain: 0.002,
    });
  });

  it('asks for the sample rate', async () => {
    expect((await readBad(fixture('npy-f8-little.npy'))).code).toBe('needs-sample-rate');
    const shown = await previewRecording(fixture('npy-f8-little.npy'), { fileName: 'a.npy' });
    expect(shown).toMatchObject({ needs: ['sampleRateHz'], problem: { code: 'needs-sample-rate' } });
    expect(shown.rows[1]?.[0]).toBe(cases.find(({ file }) => file === 'npy-f8-little.npy')?.channels[0]?.[1]);
  });

  it.each([
    ['npy-structured.npy', /structured/],
    ['npy-complex.npy', /complex/],
    ['npy-object.npy', /objects/],
  ])('refuses %s with words', async (name, words) => {
    const problem = await readBad(fixture(name), rate, name);
    expect(problem).toMatchObject({
      code: 'unsupported-encoding',
      message: expect.stringMatching(words) as string,
    });
    const size = fixture(name).length;
    expect((await previewRecording(fixture(name), { fileName: name, sizeBytes: size })).problem).toEqual(
      problem,
    );
  });

  it.each([
    ['half floats', npy(dictionary("'<f2'", '(4,)')), 'unsupported-encoding', /<f2/],
    ['texts', npy(dictionary("'<U7'", '(4,)')), 'unsupported-encoding', /<U7/],
    ['three dimensions', npy(dictionary("'<f8'", '(4, 2, 3)')), 'unsupported-shape', /3 dimensions/],
    ['no dimension', npy(dictionary("'<f8'", '()')), 'unsupported-shape', /0 dimensions/],
    ['a shape of words', npy(dictionary("'<f8'", '(many,)')), 'bad-header', /many/],
    ['no shape', npy("{'descr': '<f8', 'fortran_order': False}"), 'bad-header', /shape/],
    ['no order', npy("{'descr': '<f8', 'shape': (4,)}"), 'bad-header', /order/],
    ['no type', npy("{'fortran_order': False, 'shape': (4,)}"), 'bad-header', /type/],
    ['too many channels', npy(dictionary("'<f8'", '(100000, 90000)')), 'too-many-channels', /90000/],
    ['an empty array', npy(dictionary("'<f8'", '(0,)')), 'no-samples', /no samples/],
    ['one sample', npy(dictionary("'|u1'", '(1,)'), [1]), 'too-few-samples', /one sample/],
    [
      'another version',
      Uint8Array.from([0x93, 78, 85, 77, 80, 89, 4, 0, 1, 1, 1, 1]),
      'unsupported-encoding',
      /4\.0/,
    ],
    ['a cut header', fixture('npy-f8-little.npy').subarray(0, 60), 'header-cut', /cut short/],
  ])('refuses %s', async (_what, bytes, code, words) => {
    const problem = await readBad(bytes, rate, 'a.npy');
    expect(problem).toMatchObject({ code, message: expect.stringMatching(words) as string });
    expect(problem.cure).not.toBe('');
  });

  it('reads cut frames as far as they go', async () => {
    const bytes = fixture('npy-f8-little.npy');
    const reading = await readGood(bytes.subarray(0, 128 + 10 * 24 + 20), rate);
    expect(reading).toMatchObject({ sampleCount: 10, missingValues: [0, 0, 0] });
    expect(reading.warnings).toMatchObject([{ code: 'truncated', samples: [10] }]);
  });

  it('keeps what is missing of cut channels as missing', async () => {
    const bytes = fixture('npy-fortran-order.npy');
    const reading = await readGood(bytes.subarray(0, 128 + 70 * 8), rate);
    expect(reading).toMatchObject({ sampleCount: 50, missingValues: [0, 30, 50] });
    expect(reading.warnings.map(({ code }) => code)).toEqual(['truncated', 'missing-values']);
    const short = await readGood(bytes.subarray(0, 128 + 7 * 8), rate);
    expect(short).toMatchObject({ sampleCount: 7, missingValues: [0, 7, 7] });
  });

  it('keeps what is no number as missing and tells of rounded integers', async () => {
    const nan = [0, 0, 0, 0, 0, 0, 0xf8, 0x7f];
    const one = [0, 0, 0, 0, 0, 0, 0xf0, 0x3f];
    const floats = await readGood(npy(dictionary("'<f8'", '(3,)'), [...one, ...nan, ...one]), rate);
    expect(floats.samples).toEqual([[1, NaN, 1]]);
    expect(floats.warnings).toMatchObject([{ code: 'missing-values', count: 1 }]);
    const large = [1, 0, 0, 0, 0, 0, 0x20, 0];
    const integers = await readGood(npy(dictionary("'<i8'", '(2,)'), [...large, ...one.fill(0)]), rate);
    expect(integers.samples).toEqual([[2 ** 53, 0]]);
    expect(integers.warnings).toMatchObject([{ code: 'rounded-values', count: 1 }]);
  });
});
