/** Reads captures from disk into arrays. */
import { createReadStream, statSync } from 'node:fs';
import { basename } from 'node:path';
import { readRecording } from '@overtally/ingest';

const CHUNK_BYTES = 1 << 20;

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
  const { size } = statSync(path);
  /** @type {Float64Array[]} */
  let room = [];
  /** @type {number[]} */
  let filled = [];
  const outcome = await readRecording(createReadStream(path, { highWaterMark: CHUNK_BYTES }), {
    fileName: basename(path),
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
