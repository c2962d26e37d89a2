/** Tells when the sources of the server or of a package have changed. */
import { existsSync, readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { setTimeout as delay } from 'node:timers/promises';
import { workspaceFolders } from './install.mjs';
import { rootDirectory } from './paths.mjs';

/** @returns {string[]} the folders whose content is built into the server; the web has its own watcher */
function watchedFolders() {
  const built = workspaceFolders().filter((folder) => !['apps/web', 'packages/launcher'].includes(folder));
  return [...built.map((folder) => `${folder}/src`), 'db/migrations'].map((folder) =>
    join(rootDirectory, folder),
  );
}

/**
 * @param {string} folder
 * @returns {string[]} `path time` of every file below it; files that vanish meanwhile are left out
 */
function stamps(folder) {
  if (!existsSync(folder)) return [];
  return readdirSync(folder, { recursive: true, encoding: 'utf8' }).flatMap((name) => {
    const found = statSync(join(folder, name), { throwIfNoEntry: false });
    return found?.isFile() ? [`${folder}/${name} ${found.mtimeMs}`] : [];
  });
}

/** @returns {string} changes when a source file is changed, added or removed */
export function sourceState() {
  return watchedFolders().flatMap(stamps).join('\n');
}

/**
 * Waits until the sources differ from the given state and have come to rest. Polling sees every kind of
 * change on every file system, and a look takes a few milliseconds.
 * @param {string} seen
 * @param {number} [intervalMs]
 * @returns {Promise<string>} the new state
 */
export async function nextSourceState(seen, intervalMs = 700) {
  let state = seen;
  while (state === seen) {
    await delay(intervalMs);
    state = sourceState();
  }
  for (let before = seen; before !== state; state = sourceState()) {
    before = state;
    await delay(intervalMs / 3);
  }
  return state;
}
