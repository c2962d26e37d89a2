import { Injectable, type OnApplicationShutdown } from '@nestjs/common';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { MessageChannel, type MessagePort } from 'node:worker_threads';
import { Piscina } from 'piscina';
import { AppConfig } from '../config/app-config.js';
import { makePrivateFolder } from '../storage/private-folder.js';
import { removeStale } from '../storage/stale-files.js';
import { arrayMemory } from './array-memory.js';
import type {
  ComputeEnvironment,
  ComputeOutcome,
  ComputeRequest,
  ComputeTask,
  FromThread,
  ToThread,
} from './compute-request.js';
import { resultOf, toPlainError } from './plain-error.js';

const threadFile = fileURLToPath(new URL('../worker/compute.thread.js', import.meta.url));
const idleTimeoutMs = 60_000;
/** Files of a reading are written to all the time; these were left by a process that was killed. */
const staleAfterMs = 3600 * 1000;

/** A thread's short-lived objects are few: samples lie outside the heap. The usual size lets each keep tens of megabytes. */
const youngGenerationMb = 8;

interface RunOptions {
  stop: AbortSignal;
  onProgress: (fraction: number) => void;
}

interface Pools {
  /** Threads that compute and wait for no other thread. */
  workers: Piscina;
  /** Threads that hand work on to `workers`; apart from them, so that no worker is held by one that waits for it. */
  coordinators: Piscina;
  /** A thread for what somebody waits for, so that it does not stand behind long readings. */
  previews: Piscina;
  /** A thread that draws reports, one at a time, so that neither a preview nor memory waits for a long one. */
  reports: Piscina;
  /** A thread for studies, whose draws take seconds. */
  studies: Piscina;
}

/** Runs computations in threads of their own, so that requests are answered meanwhile. */
@Injectable()
export class ComputePool implements OnApplicationShutdown {
  private pools: Promise<Pools> | undefined;

  constructor(private readonly config: AppConfig) {}

  /**
   * Runs the named task. `stop` asks it to end early, upon which it fails with an error named `ComputeStopped`;
   * `onProgress` receives the share done, 0 to 1.
   */
  async run<Input, Result>(task: ComputeTask, input: Input, options: RunOptions): Promise<Result> {
    const stopFlag = new Int32Array(new SharedArrayBuffer(4));
    const raise = () => Atomics.store(stopFlag, 0, 1);
    if (options.stop.aborted) raise();
    options.stop.addEventListener('abort', raise, { once: true });
    try {
      return resultOf(await this.perform(task, input, stopFlag, options.onProgress)) as Result;
    } finally {
      options.stop.removeEventListener('abort', raise);
    }
  }

  async onApplicationShutdown(): Promise<void> {
    if (this.pools === undefined) return;
    const { coordinators, ...others } = await this.pools;
    await Promise.all([coordinators, ...Object.values(others)].map((pool: Piscina) => pool.destroy()));
  }

  /** Runs a task, and what it hands on, under one flag to stop. */
  private async perform(
    task: ComputeTask,
    input: unknown,
    stopFlag: Int32Array,
    onProgress: (fraction: number) => void,
  ): Promise<ComputeOutcome> {
    this.pools ??= this.open();
    const pools = await this.pools;
    const { port1, port2 } = new MessageChannel();
    port1.on('message', (message: FromThread) => {
      if (message.kind === 'progress') onProgress(message.fraction);
      else void this.answer(message, stopFlag, port1);
    });
    try {
      const request: ComputeRequest = { task, input, stopFlag, port: port2 };
      return (await poolFor(task, pools).run(request, { transferList: [port2] })) as ComputeOutcome;
    } finally {
      port1.close();
    }
  }

  /** Does what a coordinator hands on; whatever comes of it, the coordinator hears of it. */
  private async answer(
    { id, task, input }: Extract<FromThread, { kind: 'delegate' }>,
    stopFlag: Int32Array,
    port: MessagePort,
  ): Promise<void> {
    const send = (message: ToThread) => port.postMessage(message, arrayMemory(message));
    const onProgress = (fraction: number) => send({ kind: 'progress', id, fraction });
    try {
      send({ kind: 'outcome', id, outcome: await this.perform(task, input, stopFlag, onProgress) });
    } catch (error) {
      send({ kind: 'outcome', id, outcome: { ok: false, error: toPlainError(error) } });
    }
  }

  private async open(): Promise<Pools> {
    // One folder for all processes that share the data: every file in it has a name of its own.
    const scratchFolder = join(this.config.dataDir, 'scratch');
    await makePrivateFolder(scratchFolder);
    await removeStale(scratchFolder, staleAfterMs);
    const environment: Omit<ComputeEnvironment, 'inBackground'> = {
      storage: this.config.storage,
      scratchFolder,
      workers: this.config.computeThreads,
    };
    const make = (maxThreads: number, inBackground: boolean) =>
      new Piscina({
        filename: threadFile,
        minThreads: 0,
        maxThreads,
        idleTimeout: idleTimeoutMs,
        resourceLimits: { maxYoungGenerationSizeMb: youngGenerationMb },
        workerData: { ...environment, inBackground } satisfies ComputeEnvironment,
      });
    const { computeThreads, jobsAtOnce } = this.config;
    return {
      workers: make(computeThreads, true),
      coordinators: make(jobsAtOnce, true),
      previews: make(1, false),
      reports: make(1, false),
      studies: make(1, false),
    };
  }
}

function poolFor(task: ComputeTask, { workers, coordinators, previews, reports, studies }: Pools): Piscina {
  if (task === 'preview') return previews;
  if (task === 'report') return reports;
  if (task === 'study') return studies;
  return task === 'analyse' ? coordinators : workers;
}
