import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { previewRecording } from '../src/index.js';
import { fixture, readAll } from './support.js';

const SEEDS = [
  'F9-P01.csv',
  'F9-P03.csv',
  'F9-P06.csv',
  'F9-P08.csv',
  'F9-P25.csv',
  'F9-P38.wav',
  'F9-P43.wav',
  'F9-P47.wav',
  'F9-P54.wav',
  'npy-f8-little.npy',
  'npy-fortran-order.npy',
  'npy-i2-big.npy',
  'comtrade-ascii.cff',
  'comtrade-binary.cff',
  'comtrade-by-stamps.cff',
  'comtrade-float32.cff',
];

interface Edit {
  at: number;
  byte: number;
  kind: 'set' | 'insert' | 'delete' | 'cut';
}

/** The .npy format has no place for the sample rate. */
const optionsFor = (name: string) => (name.endsWith('.npy') ? { sampleRateHz: 4000 } : {});

function mutate(bytes: Uint8Array, edits: Edit[]): Uint8Array {
  // The short head holds what decides; mutations there matter most.
  let out = Array.from(bytes.subarray(0, 1500));
  for (const { at, byte, kind } of edits) {
    const index = Math.floor(at * at * out.length);
    if (kind === 'set') out[index] = byte;
    else if (kind === 'insert') out.splice(index, 0, byte);
    else if (kind === 'delete') out.splice(index, 1);
    else if (at > 0.9) out = out.slice(0, index);
  }
  return Uint8Array.from(out);
}

const edit = fc.record({
  at: fc.double({ min: 0, max: 0.999999, noNaN: true }),
  byte: fc.oneof(fc.integer({ min: 0, max: 255 }), fc.constantFrom(0, 10, 13, 34, 44, 45, 46, 59, 255)),
  kind: fc.constantFrom('set' as const, 'insert' as const, 'delete' as const, 'cut' as const),
});

// Generous, so that a busy machine is not taken for a hang.
describe('damaged files', { timeout: 30_000 }, () => {
  it.each(SEEDS)('give an outcome, never an exception: %s', async (name) => {
    const bytes = fixture(name);
    await fc.assert(
      fc.asyncProperty(fc.array(edit, { minLength: 1, maxLength: 12 }), async (edits) => {
        const damaged = mutate(bytes, edits);
        const { outcome, samples } = await readAll(damaged, optionsFor(name), name, 512);
        if (outcome.ok) {
          expect(outcome.sampleRateHz).toBeGreaterThan(0);
          for (const values of samples) expect(values).toHaveLength(outcome.sampleCount);
          const gaps = samples.map((values) => values.filter((value) => !Number.isFinite(value)).length);
          expect(gaps).toEqual(outcome.missingValues);
        } else expect(outcome.problem.message.length * outcome.problem.cure.length).toBeGreaterThan(0);
        const preview = await previewRecording(damaged, { fileName: name, sizeBytes: damaged.length });
        expect(preview.layout.doubts).toBeInstanceOf(Array);
      }),
      { seed: 20240917, numRuns: 50 },
    );
  });

  it('give an outcome for arbitrary bytes', async () => {
    await fc.assert(
      fc.asyncProperty(
        fc.uint8Array({ maxLength: 300 }),
        fc.constantFrom(
          '',
          'RIFF    WAVE',
          'RIFF    WAVEfmt ',
          '--- file type: CFG ---\n',
          '\u0093NUMPY\u0001\u0000\u0020\u0000',
        ),
        async (tail, start) => {
          const bytes = Uint8Array.from([...Array.from(start, (letter) => letter.charCodeAt(0)), ...tail]);
          expect(typeof (await readAll(bytes)).outcome.ok).toBe('boolean');
        },
      ),
      { seed: 7, numRuns: 200 },
    );
  });
});
