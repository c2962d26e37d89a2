import { expect, it } from 'vitest';
import { analyseTask } from './analyse-task.js';
import { tooLongProblem } from './record-length.js';

const channel = {
  ...{ index: 0, name: 'u', quantity: 'voltage' as const, unit: 'V', gain: 1, offset: 0 },
  ...{ lowestCode: null, highestCode: null, samplesKey: 'none' },
};

it('takes 2 GiB of float64 samples and names the longest span beyond', () => {
  expect(tooLongProblem(2 ** 28, 1, 1e6)).toBeNull();
  expect(tooLongProblem(2 ** 26, 4, 1e6)).toBeNull();
  // 2^27 samples of each of two channels at 1 MHz last 134.217728 s.
  expect(tooLongProblem(2 ** 27 + 1, 2, 1e6)).toMatchObject({
    code: 'record-too-long',
    cure: expect.stringContaining('at most 134 s'),
  });
});

it('ends an analysis before its samples are loaded', async () => {
  const settings = { profile: 'mains', nominalFrequencyHz: 50 } as const;
  const input = { channels: [channel], sampleRateHz: 1e6, sampleCount: 2 ** 29, settings, outputPrefix: 'a' };
  const context = { reportProgress: () => undefined, shouldStop: () => false, scratchFolder: '' };
  // A store that is not there: nothing may be read from it.
  await expect(analyseTask(input, { ...context, storage: undefined as never })).resolves.toMatchObject({
    ok: false,
    problem: { code: 'record-too-long' },
  });
});
