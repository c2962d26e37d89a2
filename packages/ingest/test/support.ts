import { readFileSync } from 'node:fs';
import { Readable } from 'node:stream';
import { type ImportOptions, readRecording, type ReadChannel, type ReadOutcome } from '../src/index.js';

/** Bytes of a file under `fixtures/readers`. */
export function fixture(name: string): Uint8Array {
  return new Uint8Array(readFileSync(new URL(`../../../fixtures/readers/${name}`, import.meta.url)));
}

/** `bytes` as a stream of chunks of `size`. */
export function inChunks(bytes: Uint8Array, size = 65536): AsyncIterable<Uint8Array> {
  const count = Math.ceil(bytes.length / size);
  return Readable.from(Array.from({ length: count }, (_, i) => bytes.subarray(i * size, (i + 1) * size)));
}

export interface Reading {
  outcome: ReadOutcome;
  begun: ReadChannel[] | null;
  samples: number[][];
}

/** Reads bytes to the end and keeps all samples. Text is taken as UTF-8. */
export async function readAll(
  content: Uint8Array | string,
  options: ImportOptions = {},
  fileName = 'capture.csv',
  chunkSize?: number,
): Promise<Reading> {
  const bytes = typeof content === 'string' ? new TextEncoder().encode(content) : content;
  const reading: { begun: ReadChannel[] | null; samples: number[][] } = { begun: null, samples: [] };
  const outcome = await readRecording(inChunks(bytes, chunkSize), {
    fileName,
    options,
    sink: {
      begin: (channels) => {
        reading.begun = channels;
        reading.samples = channels.map(() => []);
      },
      write: (index, samples) => {
        for (const value of samples) reading.samples[index]?.push(value);
      },
    },
  });
  return { outcome, ...reading };
}

/** A successful reading, or a test failure that shows the problem. */
export async function readGood(content: Uint8Array | string, options?: ImportOptions, fileName?: string) {
  const { outcome, samples } = await readAll(content, options, fileName);
  if (!outcome.ok) throw new Error(`refused: ${outcome.problem.code}: ${outcome.problem.message}`);
  return { ...outcome, samples };
}

/** The problem of a refused reading, or a test failure. */
export async function readBad(content: Uint8Array | string, options?: ImportOptions, fileName?: string) {
  const { outcome } = await readAll(content, options, fileName);
  if (outcome.ok)
    throw new Error(`accepted with ${outcome.sampleCount} samples at ${outcome.sampleRateHz} Hz`);
  return outcome.problem;
}
