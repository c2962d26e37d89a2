import type { Lock, Locker, RequestRelease } from '@tus/server';
import { problem } from '../../common/problem.js';

const patienceMs = 30_000;

interface Holder {
  /** Asks who holds the lock to let go. */
  requestRelease: RequestRelease;
  released: Promise<void>;
  release(): void;
}

/**
 * One request at a time works on an upload. Who wants to continue one whose earlier connection hangs makes that one let
 * go; the locker that comes with the server spins while it waits.
 */
export class UploadLocks implements Locker {
  private readonly holders = new Map<string, Holder>();

  newLock(id: string): Lock {
    let held: Holder | undefined;
    return {
      lock: async (signal, requestRelease) => {
        held = await this.acquire(id, signal, requestRelease);
      },
      unlock: () => {
        held?.release();
        return Promise.resolve();
      },
    };
  }

  /**
   * Does `work` while nobody else works on the upload.
   * @throws ProblemException 409 when another request works on it for long
   */
  async hold<T>(id: string, signal: AbortSignal, work: () => Promise<T>): Promise<T> {
    const holder = await this.acquire(id, signal, () => undefined);
    try {
      return await work();
    } finally {
      holder.release();
    }
  }

  private async acquire(id: string, signal: AbortSignal, requestRelease: RequestRelease): Promise<Holder> {
    const end = Date.now() + patienceMs;
    for (;;) {
      signal.throwIfAborted();
      const current = this.holders.get(id);
      if (current === undefined) return this.take(id, requestRelease);
      await current.requestRelease();
      await settledWithin(current.released, end - Date.now(), signal);
      if (Date.now() >= end && this.holders.has(id))
        throw problem(409, 'upload-in-use', 'Another request works on this upload; try again in a while');
    }
  }

  private take(id: string, requestRelease: RequestRelease): Holder {
    let settle: () => void = () => undefined;
    const released = new Promise<void>((resolve) => (settle = resolve));
    const holder = {
      requestRelease,
      released,
      release: () => {
        if (this.holders.get(id) === holder) this.holders.delete(id);
        settle();
      },
    };
    this.holders.set(id, holder);
    return holder;
  }
}

/** Waits for `work`, but no longer than `ms` and than `signal` allows. */
async function settledWithin(work: Promise<void>, ms: number, signal: AbortSignal): Promise<void> {
  const over = new AbortController();
  const enough = new Promise<void>((resolve) => {
    const timer = setTimeout(resolve, Math.max(0, ms));
    over.signal.addEventListener('abort', () => clearTimeout(timer));
    signal.addEventListener('abort', () => resolve(), { signal: over.signal });
  });
  await Promise.race([work, enough]);
  over.abort();
}
