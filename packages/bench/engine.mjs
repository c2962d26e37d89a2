/** Analyses captures in this thread or in several. */
import { once } from 'node:events';
import { Worker } from 'node:worker_threads';
import { analyseRecord, analyseSource } from '@overtally/dsp';

/**
 * @param {object} settings
 * @param {number} threads
 */
export function createEngine(settings, threads) {
  if (threads === 1) {
    /** @param {import('./capture.mjs').Capture} capture */
    const analyse = async ({ sampleRateHz, channels, samples }) =>
      analyseRecord({
        sampleRateHz,
        channels: channels.map((channel, i) => ({ ...described(channel), samples: samples[i] })),
        settings,
      });
    return { analyse, close: async () => undefined };
  }
  const crew = createCrew(threads);
  return {
    /** @param {import('./capture.mjs').Capture} capture */
    analyse: ({ sampleRateHz, channels, samples }) =>
      analyseSource(
        { sampleRateHz, sampleCount: samples[0].length, channels: channels.map(described), settings },
        { runPart: (part) => crew.run(part, samples[part.channel.index]), parallel: threads },
      ),
    close: crew.close,
  };
}

/** @param {import('@overtally/dsp').ChannelDescription} channel */
const described = ({ index, name, quantity, unit }) => ({ index, name, quantity, unit });

/** @param {number} threads */
function createCrew(threads) {
  const thread = new URL('part.thread.mjs', import.meta.url);
  const idle = Array.from({ length: threads }, () => new Worker(thread));
  const all = [...idle];
  return {
    /**
     * @param {import('@overtally/dsp').AnalysisPart} part one at a time for each thread
     * @param {Float64Array} samples in shared memory
     */
    async run(part, samples) {
      const worker = idle.pop();
      worker.postMessage({ part, samples });
      const [{ result, error }] = await once(worker, 'message');
      idle.push(worker);
      if (error) throw error;
      return result;
    },
    close: () => Promise.all(all.map((worker) => worker.terminate())),
  };
}
