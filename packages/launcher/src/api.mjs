/** The server process: its environment, its start and the moment it is ready. */
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { demoSetting } from './demo-setting.mjs';
import { LauncherError } from './lifecycle.mjs';
import { rootDirectory } from './paths.mjs';
import { startService } from './processes.mjs';
import { sessionSecret } from './session-secret.mjs';

/**
 * @typedef {object} ApiOptions
 * @property {string} databaseUrl
 * @property {string} dataDirectory
 * @property {string} host
 * @property {number} port
 */

/**
 * How the C library keeps memory for many threads that take and give back arrays of megabytes: in few places, and large
 * arrays apart, so that they go back to the system at once. Without it glibc keeps hundreds of megabytes that nobody uses.
 */
const allocation = { MALLOC_ARENA_MAX: '2', MALLOC_MMAP_THRESHOLD_: '4194304' };

/**
 * Starts the built server. What the user set in the environment wins over the defaults given here.
 * @param {ApiOptions} options
 */
export function startApi({ databaseUrl, dataDirectory, host, port }) {
  const main = join(rootDirectory, 'apps/api/dist/main.js');
  const env = {
    ...allocation,
    ...process.env,
    DATABASE_URL: databaseUrl,
    DATA_DIR: dataDirectory,
    HOST: host,
    PORT: String(port),
    PUBLIC_URL: process.env.PUBLIC_URL || localAddress(host, port),
    WEB_DIST: process.env.WEB_DIST || join(rootDirectory, 'apps/web/dist'),
    DEMO: demoSetting(process.env, host),
    LOG_FORMAT: process.env.LOG_FORMAT || 'pretty',
    SESSION_SECRET: sessionSecret(dataDirectory),
  };
  return startService(process.execPath, ['--enable-source-maps', main], { cwd: rootDirectory, env });
}

/**
 * The address under which this machine reaches a server that listens on the given host.
 * @param {string} host
 * @param {number} port
 */
export function localAddress(host, port) {
  const reachable =
    { '0.0.0.0': '127.0.0.1', '::': '[::1]' }[host] ?? (host.includes(':') ? `[${host}]` : host);
  return `http://${reachable}:${port}`;
}

/**
 * Waits until the server answers that it is healthy.
 * @param {string} address
 * @param {import('./processes.mjs').Service} api
 * @param {number} [timeoutMs] a first start migrates and fills the demo project
 * @throws {LauncherError} when the server ends or the time is over
 */
export async function waitUntilHealthy(address, api, timeoutMs = 300_000) {
  const deadline = Date.now() + timeoutMs;
  /** @type {number | undefined} */
  let exitCode;
  void api.exited.then((code) => (exitCode = code));
  while (Date.now() < deadline) {
    if (exitCode !== undefined)
      throw new LauncherError(`The server ended while starting (exit code ${exitCode}, see above).`);
    if (await answersOk(`${address}/api/health`)) return;
    await delay(150);
  }
  throw new LauncherError(`The server did not become ready within ${timeoutMs / 1000} s.`);
}

/** @param {string} url */
async function answersOk(url) {
  try {
    const reply = await fetch(url, { signal: AbortSignal.timeout(5_000) });
    await reply.arrayBuffer();
    return reply.ok;
  } catch {
    // Not listening yet, which is what the caller waits for.
    return false;
  }
}
