/** Child processes: each leads a process group of its own, and none outlives the launcher. */
import { spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { onStop, refuseWhenStopping } from './lifecycle.mjs';

/**
 * @typedef {object} RunOptions
 * @property {string} [cwd]
 * @property {NodeJS.ProcessEnv} [env]
 * @property {number} [uid] run as this user
 * @property {number} [gid]
 * @property {'show' | 'collect' | 'discard'} [output] default `show`
 * @property {number} [timeoutMs] end it after this time
 * @property {boolean} [finishOnStop] may run, and ends by itself, while the launcher stops
 */

const setpriv = '/usr/bin/setpriv';

/**
 * Starts a child. It leads its own group, so the Ctrl-C of a terminal reaches the launcher alone, which
 * then stops things in order; where setpriv exists the kernel ends the child should the launcher be killed.
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions} options
 */
function launch(command, args, options) {
  if (!options.finishOnStop) refuseWhenStopping();
  const { output = 'show', cwd, env, uid, gid } = options;
  const argv = existsSync(setpriv)
    ? [setpriv, '--pdeathsig', 'TERM', '--', command, ...args]
    : [command, ...args];
  const stream = {
    show: /** @type {const} */ ('inherit'),
    collect: /** @type {const} */ ('pipe'),
    discard: /** @type {const} */ ('ignore'),
  }[output];
  return spawn(argv[0] ?? command, argv.slice(1), {
    cwd,
    env,
    uid,
    gid,
    detached: true,
    stdio: ['ignore', stream, stream],
  });
}

/**
 * Runs a program to its end.
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions} [options]
 * @returns {Promise<{ code: number, output: string }>} code 127 when the program could not be started,
 *   128 when a signal or the time limit ended it; output is empty unless it is collected
 */
export function run(command, args, options = {}) {
  const child = launch(command, args, options);
  const forget = options.finishOnStop ? () => {} : onStop(() => endGroup(child, 5_000));
  const limit = options.timeoutMs && setTimeout(() => void endGroup(child, 5_000), options.timeoutMs);
  let output = '';
  for (const stream of [child.stdout, child.stderr]) stream?.on('data', (chunk) => (output += String(chunk)));
  return new Promise((resolve) => {
    child.once('error', (error) => {
      clearTimeout(limit);
      forget();
      resolve({ code: 127, output: error.message });
    });
    child.once('close', (code) => {
      clearTimeout(limit);
      forget();
      resolve({ code: code ?? 128, output });
    });
  });
}

/**
 * @typedef {object} Service
 * @property {Promise<number>} exited resolves to the exit code (128 when ended by a signal)
 * @property {() => Promise<void>} stop asks the process to end and waits for it
 */

/**
 * Starts a program that keeps running until it is stopped.
 * @param {string} command
 * @param {string[]} args
 * @param {RunOptions & { graceMs?: number }} [options] graceMs: how long it may take to end when asked
 * @returns {Service}
 */
export function startService(command, args, options = {}) {
  const child = launch(command, args, options);
  /** @type {Promise<number>} */
  const exited = new Promise((resolve) => {
    child.once('error', () => resolve(127));
    child.once('exit', (code) => resolve(code ?? 128));
  });
  const stopService = () => endGroup(child, options.graceMs ?? 15_000);
  void exited.then(onStop(stopService));
  return { exited, stop: stopService };
}

/**
 * Asks a child to end, waits, and ends what is left of its group.
 * @param {import('node:child_process').ChildProcess} child
 * @param {number} graceMs
 */
async function endGroup(child, graceMs) {
  const { pid } = child;
  if (pid === undefined) return;
  if (child.exitCode === null && child.signalCode === null) {
    const ended = new Promise((resolve) => child.once('exit', () => resolve(true)));
    child.kill('SIGTERM');
    const timeout = new Promise((resolve) => setTimeout(() => resolve(false), graceMs).unref());
    if (!(await Promise.race([ended, timeout]))) child.kill('SIGKILL');
  }
  try {
    process.kill(-pid, 'SIGKILL');
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code !== 'ESRCH') throw error;
  }
}
