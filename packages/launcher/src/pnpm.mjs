/** pnpm without a pnpm on the machine: npx fetches the version that package.json names. */
import { run } from './processes.mjs';
import { readJson, rootDirectory } from './paths.mjs';

/**
 * Runs pnpm at the top of the checkout. pnpm is on the PATH of what it starts, which turbo needs.
 * @param {string[]} args
 * @param {import('./processes.mjs').RunOptions} [options]
 */
export function pnpm(args, options = {}) {
  /** @type {string} */
  const version = readJson('package.json').packageManager;
  return run('npx', ['--yes', version, ...args], {
    cwd: rootDirectory,
    ...options,
    env: { ...process.env, TURBO_TELEMETRY_DISABLED: '1', DO_NOT_TRACK: '1', ...options.env },
  });
}
