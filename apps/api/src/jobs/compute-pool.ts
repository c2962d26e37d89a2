import { Injectable, type OnApplicationShutdown } from '@nestjs/common';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import { AppConfig } from '../config/app-config.js';
import { makePrivateFolder } from '../storage/private-folder.js';
import { removeStale } from '../storage/stale-files.js';
import type { ComputeEnvironment, ComputeRequest } from './compute-request.js';

const threadFile = fileURLToPath(new URL('../worker/compute.thread.js', import.meta.url));
const idleTimeoutMs = 60_000;
/** Files of a reading are written to all the time; these were left by a process that was killed. */
const staleAfterMs = 3600 * 1000;

/** Runs computations in threads of their own, so that requests are answered meanwhile. */
@Injectable()
export class ComputePool implements OnApplicationShutdown {
  private pool: Promise<Piscina> | undefined;

  constructor(private readonly config: AppConfig) {}

  /**
   * Runs the named task. `stop` asks it to end early, upon which it fails with an error named `ComputeStopped`;
   * `onProgress` receives the share done, 0 to 1.
   */
  async run<Input, Result>(
    task: ComputeRequest['task'],
    input: Input,
    options: { stop: AbortSignal; onProgress: (fraction: number) => void },
  ): Promise<Result> {
    this.pool ??= this.open();
    const pool = await this.pool;
    const stopFlag = new Int32Array(new SharedArrayBuffer(4));
    const raise = () => Atomics.store(stopFlag, 0, 1);
    if (options.stop.aborted) raise();
    options.stop.addEventListener('abort', raise, { once: true });
    const { port1, port2 } = new MessageChannel();
    port1.on('message', (fraction: number) => options.onProgress(fraction));
    try {
      const request: ComputeRequest = { task, input, stopFlag, progressPort: port2 };
      return (await pool.run(request, { transferList: [port2] })) as Result;
    } finally {
      port1.close();
      options.stop.removeEventListener('abort', raise);
    }
  }

  async onApplicationShutdown(): Promise<void> {
    if (this.pool === undefined) return;
    await (await this.pool).destroy();
  }

  private async open(): Promise<Piscina> {
    // One folder for all processes that share the data: every file in it has a name of its own.
    const scratchFolder = join(this.config.dataDir, 'scratch');
    await makePrivateFolder(scratchFolder);
    await removeStale(scratchFolder, staleAfterMs);
    const workerData: ComputeEnvironment = {
      storage: { kind: 'disk', folder: join(this.config.dataDir, 'storage') },
      scratchFolder,
    };
    return new Piscina({
      filename: threadFile,
      minThreads: 0,
      maxThreads: this.config.computeThreads,
      idleTimeout: idleTimeoutMs,
      workerData,
    });
  }
}
