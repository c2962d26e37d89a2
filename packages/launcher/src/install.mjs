/** Installs the packages, and skips it while nothing that decides about them has changed. */
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { LauncherError } from './lifecycle.mjs';
import { rootDirectory } from './paths.mjs';
import { pnpm } from './pnpm.mjs';

/** @returns {string[]} the folders of the workspace's packages, relative to the top folder */
export function workspaceFolders() {
  const grouped = ['apps', 'packages'].flatMap((group) =>
    readdirSync(join(rootDirectory, group)).map((name) => `${group}/${name}`),
  );
  return [...grouped, 'db', 'fixtures'].filter((folder) =>
    existsSync(join(rootDirectory, folder, 'package.json')),
  );
}

/** @returns {string} a hash over all that decides which packages are installed */
function installState() {
  const hash = createHash('sha256').update(process.versions.modules);
  const manifests = workspaceFolders().map((folder) => `${folder}/package.json`);
  for (const file of ['pnpm-lock.yaml', 'pnpm-workspace.yaml', 'package.json', ...manifests]) {
    hash.update(file).update(readFileSync(join(rootDirectory, file)));
  }
  return hash.digest('hex');
}

/** @throws {LauncherError} when pnpm fails */
export async function installWorkspace() {
  const marker = join(rootDirectory, 'node_modules', '.overtally-install');
  const state = installState();
  if (existsSync(marker) && readFileSync(marker, 'utf8') === state) return;
  console.log('Installing packages …');
  const { code } = await pnpm(['install', '--frozen-lockfile', '--reporter=append-only', '--loglevel=warn']);
  if (code !== 0) {
    throw new LauncherError(
      'The packages could not be installed (see above). This step needs to reach the npm registry.',
    );
  }
  writeFileSync(marker, state);
}
