import type { MessagePort } from 'node:worker_threads';
import type { StorageLocation } from '../storage/storage-location.js';

/** What every compute thread is started with. */
export interface ComputeEnvironment {
  storage: StorageLocation;
  scratchFolder: string;
}

/** One computation, as sent to a thread. */
export interface ComputeRequest {
  task: 'read' | 'analyse';
  input: unknown;
  /** Its one element turns 1 when the result is no longer wanted. */
  stopFlag: Int32Array;
  progressPort: MessagePort;
}
