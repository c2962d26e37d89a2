import { workerData } from 'node:worker_threads';
import { move, transferableSymbol, valueSymbol } from 'piscina';
import { analyseTask, type AnalyseTaskInput } from '../analyses/computing/analyse-task.js';
import { partTask, type PartTaskInput } from '../analyses/computing/part-task.js';
import { arrayMemory } from '../jobs/array-memory.js';
import type {
  ComputeEnvironment,
  ComputeOutcome,
  ComputeRequest,
  FromThread,
} from '../jobs/compute-request.js';
import type { ComputeContext } from '../jobs/compute-task.js';
import { Delegation } from '../jobs/delegation.js';
import { toPlainError } from '../jobs/plain-error.js';
import { previewTask, type PreviewTaskInput } from '../recordings/previewing/preview-task.js';
import { readTask, type ReadTaskInput } from '../recordings/reading/read-task.js';
import { reportTask, type ReportTaskInput } from '../reports/rendering/report-task.js';
import { studyTask, type StudyTaskInput } from '../studies/computing/study-task.js';
import { openStorage } from '../storage/open-storage.js';
import { lowerThreadPriority } from './lower-priority.js';

const progressIntervalMs = 100;

const environment = workerData as ComputeEnvironment;
/** One for all tasks of the thread, so that connections to the store are kept. */
const storage = await openStorage(environment.storage);

if (environment.inBackground) lowerThreadPriority();

/** Entry point of a compute thread: runs one task at a time. */
export default async function compute(request: ComputeRequest): Promise<unknown> {
  const outcome = await outcomeOf(request);
  // Long arrays are handed over, not copied.
  return move({ [valueSymbol]: outcome, [transferableSymbol]: arrayMemory(outcome) });
}

async function outcomeOf(request: ComputeRequest): Promise<ComputeOutcome> {
  try {
    return { ok: true, result: await perform(request, contextOf(request)) };
  } catch (error) {
    return { ok: false, error: toPlainError(error) };
  } finally {
    request.port.close();
  }
}

function perform({ task, input }: ComputeRequest, context: ComputeContext): Promise<unknown> {
  switch (task) {
    case 'preview':
      return previewTask(input as PreviewTaskInput);
    case 'study':
      return studyTask(input as StudyTaskInput, context);
    case 'report':
      return reportTask(input as ReportTaskInput, context);
    case 'read':
      return readTask(input as ReadTaskInput, context);
    case 'analyse':
      return analyseTask(input as AnalyseTaskInput, context);
    case 'analysis-part':
      return partTask(input as PartTaskInput, context);
  }
}

function contextOf({ stopFlag, port }: ComputeRequest): ComputeContext {
  const { scratchFolder, workers } = environment;
  const delegation = new Delegation(port);
  let reportedAt = 0;
  return {
    storage,
    scratchFolder,
    workers,
    reportProgress: (fraction) => {
      if (Date.now() - reportedAt < progressIntervalMs) return;
      reportedAt = Date.now();
      const message: FromThread = { kind: 'progress', fraction: Math.min(1, Math.max(0, fraction)) };
      port.postMessage(message);
    },
    shouldStop: () => Atomics.load(stopFlag, 0) === 1,
    delegate: (task, input, onProgress) => delegation.run(task, input, onProgress),
  };
}
