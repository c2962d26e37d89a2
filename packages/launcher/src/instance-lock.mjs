/** One launcher per data folder: a file with the process id, which a launcher that died leaves behind harmlessly. */
import { readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { LauncherError, onStop } from './lifecycle.mjs';

/**
 * Takes the data folder for this process until it stops.
 * @param {string} dataDirectory
 * @throws {LauncherError} when another launcher uses it
 */
export function takeDataDirectory(dataDirectory) {
  const file = join(dataDirectory, 'launcher.pid');
  const holder = readHolder(file);
  if (holder !== undefined && isLauncher(holder)) {
    throw new LauncherError(
      `Overtally is already running with this data folder (process ${holder}). Stop it first, or set DATA_DIR to another folder.`,
    );
  }
  rmSync(file, { force: true });
  writeFileSync(file, `${process.pid}\n`, { flag: 'wx' });
  onStop(() => rmSync(file, { force: true }));
}

/**
 * @param {string} file
 * @returns {number | undefined}
 */
function readHolder(file) {
  try {
    return Number(readFileSync(file, 'utf8')) || undefined;
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'ENOENT') return undefined;
    throw error;
  }
}

/**
 * Process ids are reused, so a living process counts only when it is a launcher.
 * @param {number} pid
 */
function isLauncher(pid) {
  if (pid === process.pid) return false;
  try {
    return /launcher\/(start|dev)\.mjs/.test(readFileSync(`/proc/${pid}/cmdline`, 'utf8'));
  } catch (error) {
    const code = /** @type {NodeJS.ErrnoException} */ (error).code;
    if (code === 'ENOENT' || code === 'ESRCH') return false;
    throw error;
  }
}
