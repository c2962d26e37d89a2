/** Computes the parts of an analysis that it is sent, on samples in shared memory. */
import { parentPort, workerData } from 'node:worker_threads';
import { computePart } from '@overtally/dsp';

/** @type {Float64Array} */
const samples = workerData;

parentPort?.on('message', (part) => {
  computePart(part, (_, from, to) => samples.subarray(from, to)).then(
    (result) => parentPort?.postMessage({ result }),
    (error) => parentPort?.postMessage({ error }),
  );
});
