import type { MessagePort } from 'node:worker_threads';
import type { StorageSettings } from '../config/storage-settings.js';

/** What every compute thread is started with. */
export interface ComputeEnvironment {
  storage: StorageSettings;
  scratchFolder: string;
  /** Whether requests and all else on the machine come first. */
  inBackground: boolean;
  /** Threads that compute at the same time. */
  workers: number;
}

/**
 * `preview`, `study` and `report` are short and somebody waits for them. `analyse` hands most of its work on as `analysis-part` and
 * waits for it; the others compute alone and wait for nothing but storage.
 */
export type ComputeTask = 'preview' | 'study' | 'report' | 'read' | 'analyse' | 'analysis-part';

/** One computation, as sent to a thread. */
export interface ComputeRequest {
  task: ComputeTask;
  input: unknown;
  /** Its one element turns 1 when the result is no longer wanted. */
  stopFlag: Int32Array;
  /** Carries `FromThread` one way and `ToThread` the other. */
  port: MessagePort;
}

/** How a computation ended: a thread passes an error on as data, since a clone of an error loses its name. */
export type ComputeOutcome = { ok: true; result: unknown } | { ok: false; error: PlainError };

export interface PlainError {
  name: string;
  message: string;
  stack?: string | undefined;
}

/** What a computation tells while it runs: its share done, or work it wants done elsewhere. */
export type FromThread =
  | { kind: 'progress'; fraction: number }
  | { kind: 'delegate'; id: number; task: ComputeTask; input: unknown };

/** Answers to `delegate`, by its id. */
export type ToThread =
  | { kind: 'progress'; id: number; fraction: number }
  | { kind: 'outcome'; id: number; outcome: ComputeOutcome };
