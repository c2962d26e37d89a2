import { describe, expect, it } from 'vitest';
import { type ImportOptions, readRecording, type ReadOutcome } from '../src/index.js';
import { fixture, inChunks, readBad, readGood } from './support.js';

const RATE = 4000;
const COUNT = 800;
const OMEGA = 2 * Math.PI * 50;
const sine = (time: number) => 325 * Math.sin(OMEGA * time + 0.3);

/** Stamps off by up to 30 % of the interval, first and last exact; a fixed sequence between -1 and 1. */
const jitter = (n: number) => 2 * ((n * 0.7548776662466927) % 1) - 1;
const stamps = Array.from({ length: COUNT }, (_, n) =>
  Number(((n + (n === 0 || n === COUNT - 1 ? 0 : 0.3 * jitter(n))) / RATE).toFixed(9)),
);
const tableOf = (times: number[], wave: (time: number) => number | string = sine) =>
  `t (s),u (V)\n${times.map((time) => `${time},${wave(time)}`).join('\n')}\n`;
const jittered = tableOf(stamps);

interface Again {
  outcome: ReadOutcome;
  samples: number[][];
  begun: number;
}

/** Reads from a source that can be opened again, as files and objects in storage can. */
async function readAgain(
  content: string | Uint8Array,
  options: ImportOptions = {},
  size?: number,
): Promise<Again> {
  const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
  const reading: Again = { outcome: null as unknown as ReadOutcome, samples: [], begun: 0 };
  reading.outcome = await readRecording(() => inChunks(bytes, size), {
    fileName: 'capture.csv',
    options,
    sink: {
      begin: (channels) => {
        reading.begun += 1;
        reading.samples = channels.map(() => []);
      },
      write: (index, samples) => void reading.samples[index]?.push(...samples),
    },
  });
  return reading;
}

function accepted({ outcome, samples }: Again) {
  if (!outcome.ok) throw new Error(`${outcome.problem.code}: ${outcome.problem.message}`);
  const warning = (code: string) => outcome.warnings.find((one) => one.code === code);
  return { ...outcome, values: samples[0] ?? [], warning };
}

/** Remainder of the cubic at `time`: |f''''| / 4! x |product of (time - node)| (Abramowitz and Stegun, 25.2.3). */
function remainder(times: number[], time: number): number {
  const after = times.findIndex((stamp) => stamp > time);
  const first = Math.min(Math.max(0, after - 2), times.length - 4);
  const nodes = after < 0 ? [time] : times.slice(first, first + 4);
  const product = nodes.reduce((all, node) => all * Math.abs(time - node), 1);
  return (325 * OMEGA ** 4 * product) / 24 + 1e-9;
}

describe('uneven time stamps', () => {
  it('are resampled: a sine at jittered times comes back within the remainder of a cubic', async () => {
    const { values, warning, ...outcome } = accepted(await readAgain(jittered));
    expect(outcome).toMatchObject({ sampleCount: COUNT, missingValues: [0], startTimeS: 0 });
    expect(outcome.sampleRateHz).toBeCloseTo(RATE, 6);
    expect(values).toHaveLength(COUNT);
    let worst = 0;
    let taken = 0;
    for (const [n, value] of values.entries()) {
      const error = Math.abs(value - sine(n / RATE));
      expect(error).toBeLessThanOrEqual(remainder(stamps, n / RATE));
      worst = Math.max(worst, error);
      taken = Math.max(taken, Math.abs(sine(stamps[n] as number) - sine(n / RATE)));
    }
    // Taken as even the same stamps are off by 7 V of 325.
    expect([worst < 3e-3, taken > 5]).toEqual([true, true]);
    expect(warning('uneven-sampling')).toMatchObject({ firstLine: 3 });
    expect(warning('uneven-sampling')?.message).toMatch(/resampled to the mean rate, 4000 Hz/);
  });

  it('give back a cubic exactly, wherever the stamps lie', async () => {
    const cubic = (time: number) => 1 + 20 * time - 300 * time ** 2 + 900 * time ** 3;
    const { values } = accepted(await readAgain(tableOf(stamps, cubic)));
    for (const [n, value] of values.entries()) expect(value).toBeCloseTo(cubic(n / RATE), 9);
  });

  it.each([7, 1000, 65536])('come out the same in chunks of %i bytes', async (size) => {
    expect((await readAgain(jittered, {}, size)).samples).toEqual((await readAgain(jittered)).samples);
  });

  it('come out the same when they go through many blocks', async () => {
    const many = Array.from({ length: 30_000 }, (_, n) => (n + 0.2 * jitter(n)) / RATE);
    const { values, sampleRateHz } = accepted(await readAgain(tableOf(many)));
    const first = many[0] as number;
    const wrong = values.filter((value, n) => Math.abs(value - sine(first + n / sampleRateHz)) > 5e-3);
    expect([values.length, wrong.length]).toEqual([30_000, 0]);
  });

  it('leave a pause missing, and the rate as outside it', async () => {
    const times = stamps.filter((_, n) => n < 300 || n >= 340);
    const { values, warning, missingValues, sampleCount, sampleRateHz } = accepted(
      await readAgain(tableOf(times)),
    );
    expect(sampleRateHz / RATE).toBeCloseTo(1, 3);
    expect(Math.abs(sampleCount - COUNT)).toBeLessThanOrEqual(1);
    const missing = values.flatMap((value, n) => (Number.isNaN(value) ? [n] : []));
    expect(missing).toHaveLength(missingValues[0] as number);
    expect([missing[0], missing.at(-1)]).toEqual([300, 339].map((n) => expect.closeTo(n, -0.4) as number));
    for (const [n, value] of values.entries()) {
      if (!Number.isNaN(value)) expect(Math.abs(value - sine(n / sampleRateHz))).toBeLessThan(0.02);
    }
    expect(warning('gap')).toMatchObject({ count: expect.any(Number) as number });
  });

  it('leave samples missing beside a cell without a number only', async () => {
    const text = jittered.split('\n');
    text[401] = `${stamps[400]},`;
    const { values, missingValues } = accepted(await readAgain(text.join('\n')));
    expect([1, 2, 3]).toContain(missingValues[0]);
    for (const [n, value] of values.entries())
      if (Number.isNaN(value)) expect(Math.abs(n - 400)).toBeLessThanOrEqual(1);
      else expect(Math.abs(value - sine(n / RATE))).toBeLessThan(0.1);
  });

  it('may be taken as even', async () => {
    const { values, warning } = accepted(await readAgain(jittered, { unevenTime: 'take-as-even' }));
    expect(values).toEqual(stamps.map(sine));
    expect(warning('uneven-sampling')?.message).toMatch(/taken as evenly spaced/);
  });

  it('are taken as even where the sample rate is given, or the source cannot be opened again', async () => {
    expect(accepted(await readAgain(jittered, { sampleRateHz: 4001 }))).toMatchObject({ sampleRateHz: 4001 });
    const once = await readGood(jittered);
    expect(once.samples[0]).toEqual(stamps.map(sine));
    expect(once.warnings.map(({ code }) => code)).toContain('uneven-sampling');
    await expect(readGood(jittered, { unevenTime: 'resample' })).rejects.toThrow(TypeError);
  });

  it('may be refused, by line', async () => {
    const problem = await readBad(jittered, { unevenTime: 'refuse' });
    expect(problem).toMatchObject({ code: 'uneven-sampling', line: 3, column: 1 });
  });

  it('are not made of too few digits: those are taken as even, and said so', async () => {
    const rounded = Array.from({ length: COUNT }, (_, n) => Number((n / 3000).toFixed(4)));
    const reading = await readAgain(tableOf(rounded));
    const { values, warning } = accepted(reading);
    expect(reading.begun).toBe(1);
    expect(values).toEqual(rounded.map(sine));
    expect(warning('uneven-sampling')?.message).toMatch(/digits of the stamps are too few/);
  });

  it('are refused where a record would be pauses for the most part', async () => {
    const times = [...stamps, 1e9];
    const { outcome } = await readAgain(tableOf(times));
    expect(outcome).toMatchObject({ ok: false, problem: { code: 'uneven-sampling' } });
  });

  it('of a COMTRADE record without a rate are resampled too', async () => {
    const head = ['--- file type: CFG ---', 'Bench,R1,1999', '1,1A,0D', '1,U,A,,V,1,0,0,-99998,99998,1,1,P'];
    const rest = ['50', '0', `0,${COUNT}`, '01/02/2024,00:00:00.0', '01/02/2024,00:00:00.0', 'ASCII', '1'];
    const rows = stamps.map(
      (time, n) => `${n + 1},${Math.round(time * 1e6)},${sine(Math.round(time * 1e6) / 1e6)}`,
    );
    const text = [...head, ...rest, '--- file type: DAT ASCII ---', ...rows, ''].join('\r\n');
    const { values, sampleRateHz, format } = accepted(await readAgain(text));
    expect(format).toBe('comtrade');
    expect(sampleRateHz).toBeCloseTo(RATE, 1);
    for (const [n, value] of values.entries()) expect(Math.abs(value - sine(n / RATE))).toBeLessThan(3e-3);
    expect(await readBad(text, { unevenTime: 'refuse' })).toMatchObject({ code: 'uneven-sampling' });
  });

  it('keep the ends of the golden file as they stand in it', async () => {
    const { values, sampleRateHz } = accepted(await readAgain(fixture('F9-P14.csv')));
    expect(sampleRateHz).toBeCloseTo(4000, 6);
    // fixtures/readers/cases.json
    expect(values[0]).toBeCloseTo(-27.041835, 9);
    expect(values.at(-1)).toBeCloseTo(-31.170679, 9);
  });
});
