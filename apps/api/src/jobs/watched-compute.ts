import type { JobContext } from './job-handler.js';

const tickMs = 250;

/**
 * Runs a computation while writing its progress at most four times a second. `tick` receives the share done and
 * says whether the result is still wanted; when it is not, or the worker stops, the computation is told to end.
 */
export async function watched<Result>(
  context: JobContext,
  tick: (progress: number) => Promise<boolean>,
  compute: (options: { stop: AbortSignal; onProgress: (fraction: number) => void }) => Promise<Result>,
): Promise<Result> {
  const unwanted = new AbortController();
  let progress = 0;
  let ticking: Promise<void> = Promise.resolve();
  let tickError: unknown;
  const timer = setInterval(() => {
    ticking = ticking
      .then(async () => {
        if (!unwanted.signal.aborted && !(await tick(progress))) unwanted.abort();
      })
      .catch((error: unknown) => {
        tickError = error;
        unwanted.abort();
      });
  }, tickMs);
  try {
    const stop = AbortSignal.any([context.signal, unwanted.signal]);
    return await compute({ stop, onProgress: (fraction) => (progress = fraction) });
  } catch (error) {
    throw tickError ?? error;
  } finally {
    clearInterval(timer);
    await ticking;
  }
}
