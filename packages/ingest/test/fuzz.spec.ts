import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { type ImportOptions, previewRecording, readRecording, type ReadOutcome } from '../src/index.js';
import { fixture, inChunks } from './support.js';

/** Mutations per format; a longer search is `FUZZ_RUNS=20000 vitest run test/fuzz.spec.ts`. */
const RUNS = Number(process.env['FUZZ_RUNS'] ?? 700);
/** Milliseconds that one reading of a few kilobytes may take on a busy machine. */
const MOST_MS = 5000;

const csv = ['01', '03', '06', '08', '10', '11', '14', '16', '18', '19', '22', '24', '25', '26', '29', '36'];
const wav = ['37', '38', '39', '41', '43', '45', '47', '49', '51', '54', '58'];
const FORMATS: Record<string, string[]> = {
  csv: csv.map((number) => `F9-P${number}.csv`),
  wav: wav.map((number) => `F9-P${number}.wav`),
  npy: ['npy-f8-little', 'npy-f4-big', 'npy-fortran-order', 'npy-channels-by-samples', 'npy-i2-big'].map(
    (name) => `${name}.npy`,
  ),
  comtrade: ['ascii', 'binary', 'binary32', 'by-stamps', 'float32'].map((name) => `comtrade-${name}.cff`),
};

/** Figures that headers are most easily misread by, as the bytes of little-endian numbers of 32 and 64 bits. */
const FIGURES = [0, 1, 0x7fffffff, 0x80000000, 0xffffffff, 10 ** 12, 2 ** 53, 2 ** 64 - 2 ** 12];
const TEXTS = [
  '999999999999',
  '-1',
  '1e308',
  '1e-308',
  '0',
  'nan',
  ',',
  ';',
  '\n',
  '\r\n',
  '"',
  '1,234',
  '\u0000',
];

type Edit =
  | { kind: 'set' | 'insert'; at: number; byte: number }
  | { kind: 'delete' | 'cut'; at: number }
  | { kind: 'repeat'; at: number; length: number }
  | { kind: 'figure'; at: number; figure: number; wide: boolean }
  | { kind: 'text'; at: number; text: string };

function piece(edit: Edit, out: number[], index: number): { remove: number; bytes: number[] } {
  switch (edit.kind) {
    case 'set':
      return { remove: 1, bytes: [edit.byte] };
    case 'insert':
      return { remove: 0, bytes: [edit.byte] };
    case 'delete':
      return { remove: 1, bytes: [] };
    case 'cut':
      return { remove: edit.at > 0.9 ? out.length : 0, bytes: [] };
    case 'repeat':
      return { remove: 0, bytes: out.slice(index, index + edit.length) };
    case 'figure': {
      const view = new DataView(new ArrayBuffer(8));
      view.setBigUint64(0, BigInt(edit.figure), true);
      const bytes = [...new Uint8Array(view.buffer)].slice(0, edit.wide ? 8 : 4);
      return { remove: bytes.length, bytes };
    }
    case 'text':
      return { remove: edit.text.length, bytes: [...new TextEncoder().encode(edit.text)] };
  }
}

function mutate(bytes: Uint8Array, edits: Edit[]): Uint8Array {
  // The short head holds what decides; mutations there matter most.
  const out = Array.from(bytes.subarray(0, 1500));
  for (const edit of edits) {
    const index = Math.floor(edit.at * edit.at * out.length);
    const { remove, bytes: put } = piece(edit, out, index);
    out.splice(index, remove, ...put);
  }
  return Uint8Array.from(out);
}

const at = fc.double({ min: 0, max: 0.999999, noNaN: true });
const byte = fc.oneof(fc.integer({ min: 0, max: 255 }), fc.constantFrom(0, 10, 13, 34, 44, 45, 46, 59, 255));
const edit = fc.oneof<fc.Arbitrary<Edit>[]>(
  fc.record({ kind: fc.constantFrom('set' as const, 'insert' as const), at, byte }),
  fc.record({ kind: fc.constantFrom('delete' as const, 'cut' as const), at }),
  fc.record({ kind: fc.constant('repeat' as const), at, length: fc.integer({ min: 1, max: 200 }) }),
  fc.record({
    kind: fc.constant('figure' as const),
    at,
    figure: fc.constantFrom(...FIGURES),
    wide: fc.boolean(),
  }),
  fc.record({ kind: fc.constant('text' as const), at, text: fc.constantFrom(...TEXTS) }),
);

const scale = fc.oneof(fc.double(), fc.constantFrom(0, 1, -2, 10, 1e300));
const column = fc.oneof(fc.integer({ min: -1, max: 9 }), fc.constantFrom('ch1', 'time', 'u', '', 'nowhere'));
const channel = fc.record(
  {
    column,
    name: fc.string({ maxLength: 8 }),
    unit: fc.constantFrom('V', 'mA', 'furlong', ''),
    gain: scale,
    offset: scale,
    fullScale: scale,
    probeRatio: scale,
    inverted: fc.boolean(),
  },
  { requiredKeys: ['column'] },
);
const someOptions: fc.Arbitrary<ImportOptions> = fc.record(
  {
    sampleRateHz: fc.oneof(fc.double(), fc.constantFrom(4000, 0, -1)),
    delimiter: fc.constantFrom(',' as const, ';' as const, '\t' as const, ' ' as const, '|' as const),
    decimal: fc.constantFrom('.' as const, ',' as const),
    headerRows: fc.integer({ min: 0, max: 12 }),
    timeColumn: fc.oneof(column, fc.constant(null)),
    timeUnit: fc.constantFrom('s' as const, 'ms' as const, 'us' as const, 'ns' as const),
    channels: fc.array(channel, { maxLength: 3 }),
    missingValues: fc.constantFrom('keep' as const, 'interpolate' as const, 'refuse' as const),
    unevenTime: fc.constantFrom('resample' as const, 'take-as-even' as const, 'refuse' as const),
  },
  { requiredKeys: [] },
);
// The .npy format has no place for the sample rate.
const options = fc.oneof(
  { weight: 2, arbitrary: fc.constant<ImportOptions>({}) },
  { weight: 2, arbitrary: fc.constant<ImportOptions>({ sampleRateHz: 4000 }) },
  { weight: 1, arbitrary: fc.constant<ImportOptions>({ missingValues: 'interpolate' }) },
  { weight: 2, arbitrary: someOptions },
);

interface Delivered {
  outcome: ReadOutcome;
  counts: number[];
  missing: number[];
}

async function deliver(bytes: Uint8Array, fileName: string, wanted: ImportOptions): Promise<Delivered> {
  const seen: { counts: number[]; missing: number[] } = { counts: [], missing: [] };
  const outcome = await readRecording(() => inChunks(bytes, 512), {
    fileName,
    options: wanted,
    sink: {
      begin: (channels) => {
        seen.counts = channels.map(() => 0);
        seen.missing = channels.map(() => 0);
      },
      write: (index, samples) => {
        seen.counts[index] = (seen.counts[index] as number) + samples.length;
        for (const value of samples)
          if (!Number.isFinite(value)) seen.missing[index] = (seen.missing[index] as number) + 1;
      },
    },
  });
  return { outcome, ...seen };
}

/** What must hold of every file under any options. */
async function check(bytes: Uint8Array, fileName: string, wanted: ImportOptions): Promise<void> {
  const start = performance.now();
  const { outcome, counts, missing } = await deliver(bytes, fileName, wanted);
  const shown = await previewRecording(bytes, { fileName, sizeBytes: bytes.length, options: wanted });
  expect(performance.now() - start).toBeLessThan(MOST_MS);
  // A sample takes a byte at least, or half a character of a row; a resampling makes no more than four of a row.
  const total = counts.reduce((sum, n) => sum + n, 0);
  const chosen = Math.max(1, wanted.channels?.length ?? 1);
  expect(total).toBeLessThanOrEqual(4 * chosen * bytes.length);
  for (const problem of [outcome.ok ? null : outcome.problem, shown.problem]) {
    if (problem === null) continue;
    expect(problem.code).toMatch(/^[a-z][a-z-]+$/);
    expect(Math.min(problem.message.length, problem.cure.length)).toBeGreaterThan(10);
    expect(`${problem.message} ${problem.cure}`).not.toMatch(/undefined|\[object/);
  }
  if (!outcome.ok) return;
  expect(outcome.sampleRateHz).toBeGreaterThan(0);
  expect(counts).toEqual(outcome.channels.map(() => outcome.sampleCount));
  expect(missing).toEqual(outcome.missingValues);
  for (const { gain, offset } of outcome.channels) {
    expect([Number.isFinite(gain), gain !== 0, Number.isFinite(offset)]).toEqual([true, true, true]);
  }
}

// Generous, so that a busy machine is not taken for a hang.
describe('damaged files under any options', { timeout: 60_000 + 20 * RUNS }, () => {
  it.each(Object.keys(FORMATS))('give an outcome, never an exception: %s', async (format) => {
    const names = FORMATS[format] as string[];
    const seeds = new Map(names.map((name) => [name, fixture(name)]));
    await fc.assert(
      fc.asyncProperty(
        fc.constantFrom(...names),
        fc.array(edit, { minLength: 1, maxLength: 12 }),
        options,
        async (name, edits, wanted) => check(mutate(seeds.get(name) as Uint8Array, edits), name, wanted),
      ),
      { seed: 20240917, numRuns: RUNS },
    );
  });

  it('give an outcome for arbitrary bytes', async () => {
    const starts = ['', 'RIFF    WAVE', 'RIFF    WAVEfmt ', '--- file type: CFG ---\n'];
    const start = fc.constantFrom(...starts, '\u0093NUMPY\u0001\u0000\u0020\u0000');
    await fc.assert(
      fc.asyncProperty(fc.uint8Array({ maxLength: 300 }), start, options, async (tail, head, wanted) => {
        const bytes = Uint8Array.from([...Array.from(head, (letter) => letter.charCodeAt(0)), ...tail]);
        await check(bytes, 'capture.csv', wanted);
      }),
      { seed: 7, numRuns: Math.ceil(RUNS / 3) },
    );
  });
});
