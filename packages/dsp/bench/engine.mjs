/** Analyses a record of one channel in this thread or in several. */
import { once } from 'node:events';
import { Worker } from 'node:worker_threads';
import { analyseRecord, analyseSource } from '@overtally/dsp';

/**
 * @param {Float64Array} samples in shared memory
 * @param {object} settings
 * @param {number} sampleRateHz
 * @param {number} threads
 */
export async function createEngine(samples, settings, sampleRateHz, threads) {
  const channel = { index: 0, name: 'i', quantity: 'current', unit: 'A' };
  if (threads === 1) {
    const record = { sampleRateHz, channels: [{ ...channel, samples }], settings };
    return { analyse: async () => analyseRecord(record), close: async () => undefined };
  }
  const crew = createCrew(samples, threads);
  const source = { sampleRateHz, sampleCount: samples.length, channels: [channel], settings };
  return {
    analyse: () => analyseSource(source, { runPart: crew.run, parallel: threads }),
    close: crew.close,
  };
}

/**
 * @param {Float64Array} samples
 * @param {number} threads
 */
function createCrew(samples, threads) {
  const thread = new URL('part.thread.mjs', import.meta.url);
  const idle = Array.from({ length: threads }, () => new Worker(thread, { workerData: samples }));
  const all = [...idle];
  return {
    /** @param {import('@overtally/dsp').AnalysisPart} part one at a time for each thread */
    async run(part) {
      const worker = idle.pop();
      worker.postMessage(part);
      const [{ result, error }] = await once(worker, 'message');
      idle.push(worker);
      if (error) throw error;
      return result;
    },
    close: () => Promise.all(all.map((worker) => worker.terminate())),
  };
}
