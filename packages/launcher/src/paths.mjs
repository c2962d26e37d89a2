/** Where things are: the checkout and the folder for data. */
import { chmodSync, existsSync, mkdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

/** The top folder of the checkout. */
export const rootDirectory = fileURLToPath(new URL('../../..', import.meta.url)).replace(/\/$/, '');

/**
 * The folder that holds everything which must survive a restart (DATA_DIR, by default `.data`), made when
 * it is absent. It may be traversed by others because the database server runs as its own user.
 * @returns {string} an absolute path
 */
export function dataDirectory() {
  const directory = resolve(rootDirectory, process.env.DATA_DIR || '.data');
  if (!existsSync(directory)) {
    mkdirSync(directory, { recursive: true });
    chmodSync(directory, 0o755);
  }
  return directory;
}

/**
 * @param {string} path relative to the top folder
 * @returns {any} the parsed JSON
 */
export function readJson(path) {
  return JSON.parse(readFileSync(resolve(rootDirectory, path), 'utf8'));
}
