/** Computes the parts of an analysis that it is sent, on samples in shared memory. */
import { parentPort } from 'node:worker_threads';
import { computePart } from '@overtally/dsp';

parentPort?.on('message', ({ part, samples }) => {
  computePart(part, (_, from, to) => samples.subarray(from, to)).then(
    (result) => parentPort?.postMessage({ result }),
    (error) => parentPort?.postMessage({ error }),
  );
});
