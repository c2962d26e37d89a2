import type { MessagePort } from 'node:worker_threads';
import type { ComputeTask, FromThread, ToThread } from './compute-request.js';
import { resultOf } from './plain-error.js';

interface Waiting {
  resolve: (result: unknown) => void;
  reject: (error: unknown) => void;
  onProgress: (fraction: number) => void;
}

/** The side of a thread that hands computations on and waits for their results. */
export class Delegation {
  private readonly waiting = new Map<number, Waiting>();
  private lastId = 0;

  constructor(private readonly port: MessagePort) {
    port.on('message', (message: ToThread) => this.receive(message));
    // A thread that waits for nothing must be able to end.
    port.unref();
  }

  /** Has a computation done by another thread; fails with the error of that computation. */
  run(task: ComputeTask, input: unknown, onProgress: (fraction: number) => void): Promise<unknown> {
    this.lastId += 1;
    const id = this.lastId;
    return new Promise((resolve, reject) => {
      this.waiting.set(id, { resolve, reject, onProgress });
      const message: FromThread = { kind: 'delegate', id, task, input };
      this.port.postMessage(message);
    });
  }

  private receive(message: ToThread): void {
    const waiting = this.waiting.get(message.id);
    if (waiting === undefined) return;
    if (message.kind === 'progress') {
      waiting.onProgress(message.fraction);
      return;
    }
    this.waiting.delete(message.id);
    try {
      waiting.resolve(resultOf(message.outcome));
    } catch (error) {
      waiting.reject(error);
    }
  }
}
