import type { Storage } from '../storage/storage.js';
import type { ComputeTask } from './compute-request.js';

/** What a computation in a worker thread may use. */
export interface ComputeContext {
  storage: Storage;
  /** Folder for files that are still being written. */
  scratchFolder: string;
  /** Threads among which delegated work is shared. */
  workers: number;
  /** Tells how much is done, 0 to 1. */
  reportProgress: (fraction: number) => void;
  /** True once the result is no longer wanted. */
  shouldStop: () => boolean;
  /** Has another thread do a part of the work; only for tasks that run among the coordinators. */
  delegate: (task: ComputeTask, input: unknown, onProgress: (fraction: number) => void) => Promise<unknown>;
}

/** Thrown by a computation that was told to stop. */
export class ComputeStopped extends Error {
  constructor() {
    super('The computation was stopped');
    this.name = 'ComputeStopped';
  }
}

/** True for `ComputeStopped`, also after its way back from a thread, which keeps the name but not the class. */
export function isComputeStopped(error: unknown): boolean {
  return error instanceof Error && error.name === 'ComputeStopped';
}
