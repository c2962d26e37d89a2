import { workerData } from 'node:worker_threads';
import { analyseTask, type AnalyseTaskInput } from '../analyses/computing/analyse-task.js';
import type { ComputeContext } from '../jobs/compute-task.js';
import type { ComputeEnvironment, ComputeRequest } from '../jobs/compute-request.js';
import { readTask, type ReadTaskInput } from '../recordings/reading/read-task.js';
import { openStorage } from '../storage/storage-location.js';
import { lowerThreadPriority } from './lower-priority.js';

const progressIntervalMs = 100;

lowerThreadPriority();

/** Entry point of a compute thread: runs one task at a time. */
export default async function compute(request: ComputeRequest): Promise<unknown> {
  const { storage, scratchFolder } = workerData as ComputeEnvironment;
  let reportedAt = 0;
  const context: ComputeContext = {
    storage: openStorage(storage),
    scratchFolder,
    reportProgress: (fraction) => {
      if (Date.now() - reportedAt < progressIntervalMs) return;
      reportedAt = Date.now();
      request.progressPort.postMessage(Math.min(1, Math.max(0, fraction)));
    },
    shouldStop: () => Atomics.load(request.stopFlag, 0) === 1,
  };
  try {
    switch (request.task) {
      case 'read':
        return await readTask(request.input as ReadTaskInput, context);
      case 'analyse':
        return await analyseTask(request.input as AnalyseTaskInput, context);
    }
  } finally {
    request.progressPort.close();
  }
}
