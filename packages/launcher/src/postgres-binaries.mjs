/** Finds the programs of the PostgreSQL server as Debian installs them. */
import { existsSync, readdirSync } from 'node:fs';

const base = '/usr/lib/postgresql';

/** @returns {number[]} the installed major versions, newest first */
function installedVersions() {
  if (!existsSync(base)) return [];
  return readdirSync(base)
    .filter((name) => existsSync(`${base}/${name}/bin/initdb`))
    .map(Number)
    .sort((a, b) => b - a);
}

/** @returns {string | undefined} the folder of the newest version's programs */
export function newestPostgresBinaries() {
  const [newest] = installedVersions();
  return newest === undefined ? undefined : `${base}/${newest}/bin`;
}

/**
 * @param {number} version the major version that made a cluster
 * @returns {string | undefined} the folder of that version's programs
 */
export function postgresBinariesOfVersion(version) {
  return installedVersions().includes(version) ? `${base}/${version}/bin` : undefined;
}
