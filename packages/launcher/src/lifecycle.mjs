/**
 * How a command of the launcher begins and ends: clean-ups registered while it starts run once, in
 * reverse order, when it ends by itself, by a failure or by a signal.
 */

/** A failure whose message tells the reader what to do; printed without a stack. */
export class LauncherError extends Error {}

/** @type {Set<() => Promise<void> | void>} */
const cleanups = new Set();
/** @type {Promise<void> | undefined} */
let stopping;

/**
 * Registers what must happen before the command ends.
 * @param {() => Promise<void> | void} cleanup
 * @returns {() => void} takes it back
 */
export function onStop(cleanup) {
  cleanups.add(cleanup);
  return () => void cleanups.delete(cleanup);
}

/** @throws {LauncherError} when the command is on its way out: nothing new may be started then */
export function refuseWhenStopping() {
  if (stopping !== undefined) throw new LauncherError('Stopped.');
}

/**
 * Runs the clean-ups once, last registered first; further calls wait for the same run.
 * @returns {Promise<void>}
 */
export function stop() {
  stopping ??= runCleanups();
  return stopping;
}

async function runCleanups() {
  for (const cleanup of [...cleanups].reverse()) {
    try {
      await cleanup();
    } catch (error) {
      console.error(`While stopping: ${error instanceof Error ? error.message : String(error)}`);
      process.exitCode = 1;
    }
  }
}

/**
 * Runs a command to its end and exits with its code.
 *
 * A terminal sends Ctrl-C to the whole process group and npm forwards it once more, so the same signal
 * may arrive twice: only the first one counts.
 * @param {() => Promise<number>} main resolves to the exit code
 * @param {{ exitCodeOnSignal: number }} options
 */
export function runCommand(main, { exitCodeOnSignal }) {
  let interrupted = false;
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => {
      if (interrupted) return;
      interrupted = true;
      console.log('\nStopping …');
      void stop().then(() => process.exit(process.exitCode ?? exitCodeOnSignal));
    });
  }
  main().then(
    async (code) => {
      if (interrupted) return;
      await stop();
      process.exit(process.exitCode ?? code);
    },
    async (error) => {
      if (interrupted) return;
      console.error(error instanceof LauncherError ? `\n${error.message}` : error);
      await stop();
      process.exit(1);
    },
  );
}
