/** Reads captures from disk into arrays. */
import { open } from 'node:fs/promises';
import { basename } from 'node:path';
import { readRecording } from '@overtally/ingest';

const BLOCK_BYTES = 1 << 18;

/**
 * @typedef {object} Capture
 * @property {number} sampleRateHz
 * @property {import('@overtally/ingest').ReadChannel[]} channels
 * @property {Float64Array[]} samples of each channel, in shared memory, so that threads can read them
 */

/**
 * @param {string} path of a file whose samples take two bytes or more
 * @returns {Promise<Capture>}
 */
export async function readCapture(path) {
  const file = await open(path);
  try {
    return await read(file, basename(path), (await file.stat()).size);
  } finally {
    await file.close();
  }
}

/**
 * @param {import('node:fs/promises').FileHandle} file
 * @param {string} fileName
 * @param {number} size
 */
async function read(file, fileName, size) {
  /** @type {Float64Array[]} */
  let room = [];
  /** @type {number[]} */
  let filled = [];
  const outcome = await readRecording(blocksOf(file), {
    fileName,
    sizeBytes: size,
    sink: {
      begin: (channels) => {
        // Memory that is never written to is never taken from the system.
        const most = Math.ceil(size / 2 / channels.length);
        room = channels.map(() => new Float64Array(new SharedArrayBuffer(8 * most)));
        filled = channels.map(() => 0);
      },
      write: (index, samples) => {
        room[index].set(samples, filled[index]);
        filled[index] += samples.length;
      },
    },
  });
  if (!outcome.ok) throw new Error(outcome.problem.message);
  const { sampleRateHz, channels } = outcome;
  return { sampleRateHz, channels, samples: room.map((values, i) => values.subarray(0, filled[i])) };
}

/**
 * The bytes of a file, the next block read while one is worked on. A block stands until the one after the next.
 * @param {import('node:fs/promises').FileHandle} file
 */
async function* blocksOf(file) {
  let [block, other] = [new Uint8Array(BLOCK_BYTES), new Uint8Array(BLOCK_BYTES)];
  let reading = file.read(block, 0, BLOCK_BYTES);
  for (;;) {
    const { bytesRead } = await reading;
    if (bytesRead === 0) return;
    reading = file.read(other, 0, BLOCK_BYTES);
    yield block.subarray(0, bytesRead);
    [block, other] = [other, block];
  }
}
