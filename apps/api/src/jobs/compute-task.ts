import type { Storage } from '../storage/storage.js';

/** What a computation in a worker thread may use. */
export interface ComputeContext {
  storage: Storage;
  /** Folder for files that are still being written. */
  scratchFolder: string;
  /** Tells how much is done, 0 to 1. */
  reportProgress: (fraction: number) => void;
  /** True once the result is no longer wanted. */
  shouldStop: () => boolean;
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
