import type { Settings } from '@overtally/contracts';
import { encodeNpyHeader } from '@overtally/ingest';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { AnalyseTaskInput, AnalyseTaskResult } from '../dist/analyses/computing/analyse-task.js';
import { ComputePool } from '../dist/jobs/compute-pool.js';
import { Storage } from '../dist/storage/storage.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const sampleRateHz = 10_000;
const shortSamples = 20_000;
/** Ten minutes and more of two channels, in some dozens of parts. */
const longSamples = 6_400_000;
const settings: Settings = { profile: 'mains', nominalFrequencyHz: 50 };

let test: TestApp;
let pool: ComputePool;

beforeAll(async () => {
  // One thread computes: whatever waits in it for another part would wait for ever.
  test = await startTestApp({ COMPUTE_THREADS: '1' });
  pool = test.app.get(ComputePool, { strict: false });
  const storage = test.app.get(Storage, { strict: false });
  for (const samples of [shortSamples, longSamples]) await storage.put(keyOf(samples), sine(samples));
});
afterAll(() => test.close());

const keyOf = (samples: number) => `records/sine-${samples}.npy`;

/** A 50 Hz sine of 230 V as stored samples, made in blocks of 2000 whole cycles. */
function sine(samples: number): Readable {
  const block = Float64Array.from(
    { length: Math.min(samples, 400_000) },
    (_, n) => 230 * Math.SQRT2 * Math.sin((2 * Math.PI * 50 * n) / sampleRateHz),
  );
  const blocks = Array.from({ length: samples / block.length }, () => new Uint8Array(block.buffer));
  return Readable.from([encodeNpyHeader(samples), ...blocks]);
}

function inputOf(samples: number, name: string): AnalyseTaskInput {
  const channel = {
    ...{ quantity: 'voltage' as const, unit: 'V', gain: 1, offset: 0, missingValues: 0 },
    ...{ lowestCode: null, highestCode: null, samplesKey: keyOf(samples) },
  };
  const channels = [0, 1].map((index) => ({ ...channel, index, name: `u${index}` }));
  return {
    ...{ channels, sampleRateHz, sampleCount: samples, warnings: [], settings },
    outputPrefix: `results/${name}`,
  };
}

interface Run {
  name: string;
  samples: number;
  onProgress?: (fraction: number) => void;
  stop?: AbortSignal;
}

function analyse({ name, samples, onProgress = () => undefined, stop }: Run): Promise<AnalyseTaskResult> {
  const options = { stop: stop ?? new AbortController().signal, onProgress };
  return pool.run<AnalyseTaskInput, AnalyseTaskResult>('analyse', inputOf(samples, name), options);
}

describe('several analyses at once', () => {
  it(
    'share one thread: a short one ends before a long one that began earlier',
    { timeout: 120_000 },
    async () => {
      const order: string[] = [];
      const ended = (name: string) => (result: AnalyseTaskResult) => {
        order.push(name);
        return result;
      };
      // Threads that are already there keep the start of one out of the race.
      await Promise.all(['first', 'second'].map((name) => analyse({ name, samples: shortSamples })));
      let begun: () => void;
      const hasBegun = new Promise<void>((resolve) => (begun = resolve));
      const long = analyse({ name: 'long', samples: longSamples, onProgress: () => begun() }).then(
        ended('long'),
      );
      await hasBegun;
      const short = analyse({ name: 'short', samples: shortSamples }).then(ended('short'));
      for (const result of await Promise.all([long, short])) {
        const rms = result.ok ? result.channels.map((channel) => channel.fundamental?.rms) : [];
        expect(rms).toEqual([expect.closeTo(230, 3), expect.closeTo(230, 3)]);
      }
      expect(order).toEqual(['short', 'long']);
    },
  );

  it('end by name when they are told to stop', { timeout: 60_000 }, async () => {
    const stop = new AbortController();
    const run = analyse({
      ...{ name: 'stopped', samples: longSamples, stop: stop.signal },
      onProgress: () => stop.abort(),
    });
    await expect(run).rejects.toMatchObject({ name: 'ComputeStopped' });
  });

  it('tell what cannot be analysed in the words of the part that found it', async () => {
    const storage = test.app.get(Storage, { strict: false });
    const values = Float64Array.from({ length: 1000 }, (_, n) => (n === 600 ? Infinity : Math.sin(n)));
    await storage.put(
      'records/infinite.npy',
      Readable.from([encodeNpyHeader(1000), new Uint8Array(values.buffer)]),
    );
    const input = inputOf(shortSamples, 'infinite');
    const [channel] = input.channels;
    const result = await pool.run<AnalyseTaskInput, AnalyseTaskResult>(
      'analyse',
      { ...input, channels: [{ ...channel!, samplesKey: 'records/infinite.npy' }], sampleCount: 1000 },
      { stop: new AbortController().signal, onProgress: () => undefined },
    );
    expect(result).toMatchObject({
      ok: false,
      problem: { code: 'cannot-be-analysed', message: expect.stringContaining('at sample 600') },
    });
  });
});
