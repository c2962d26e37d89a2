/**
 * The folder of a private database cluster and the account that runs it. PostgreSQL refuses to run as
 * root, so root hands the folder to the user `postgres`, who must be able to reach it.
 */
import { createHash } from 'node:crypto';
import {
  chmodSync,
  chownSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  rmSync,
  statSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { LauncherError } from './lifecycle.mjs';
import { run } from './processes.mjs';

/** @typedef {{ uid?: number, gid?: number }} Account empty: the user who runs the launcher */
/** @typedef {{ directory: string, account: Account }} ClusterHome */

/**
 * The folder of the cluster that keeps its data: `postgres` in the data folder, or for root, where the
 * user `postgres` cannot reach that, a folder under /var/lib.
 * @param {string} dataDirectory
 * @returns {Promise<ClusterHome>}
 * @throws {LauncherError}
 */
export async function keptClusterHome(dataDirectory) {
  const preferred = join(dataDirectory, 'postgres');
  const id = createHash('sha256').update(dataDirectory).digest('hex').slice(0, 12);
  for (const directory of isRoot() ? [preferred, `/var/lib/overtally/${id}/postgres`] : [preferred]) {
    const account = accountFor(directory);
    if (await canHold(directory, account)) {
      if (directory !== preferred) {
        console.log(`The database is kept in ${directory}: the user postgres cannot reach ${dataDirectory}.`);
      }
      return { directory, account };
    }
  }
  throw new LauncherError(
    `The database cannot be kept in ${preferred}: this user may not write there. Set DATA_DIR to a folder of your own.`,
  );
}

/**
 * A fresh folder for a cluster that is thrown away.
 * @returns {Promise<ClusterHome>}
 * @throws {LauncherError}
 */
export async function temporaryClusterHome() {
  for (const parent of [tmpdir(), '/var/tmp']) {
    const directory = mkdtempSync(join(parent, 'overtally-cluster-'));
    const account = accountFor(directory);
    if (await canHold(directory, account)) return { directory, account };
    rmSync(directory, { recursive: true });
  }
  throw new LauncherError(
    'No temporary folder can hold the test database. Set TMPDIR to one that every user can reach.',
  );
}

function isRoot() {
  return process.getuid?.() === 0;
}

/**
 * The owner of a folder that is already in use, else for root the user `postgres`.
 * @param {string} directory
 * @returns {Account}
 */
function accountFor(directory) {
  if (!isRoot()) return {};
  if (existsSync(directory)) {
    const { uid, gid } = statSync(directory);
    if (uid !== 0) return { uid, gid };
  }
  const entry = /^postgres:[^:]*:(\d+):(\d+):/m.exec(readFileSync('/etc/passwd', 'utf8'));
  if (entry === null)
    throw new LauncherError('The user postgres is missing: reinstall the package postgresql.');
  return { uid: Number(entry[1]), gid: Number(entry[2]) };
}

/**
 * Makes the folder if need be, and tries whether the account can write in it.
 * @param {string} directory
 * @param {Account} account
 */
async function canHold(directory, account) {
  const isNew = !existsSync(directory);
  try {
    mkdirSync(directory, { recursive: true });
  } catch (error) {
    if (/** @type {NodeJS.ErrnoException} */ (error).code === 'EACCES') return false;
    throw error;
  }
  if (account.uid !== undefined && account.gid !== undefined) chownSync(directory, account.uid, account.gid);
  if (isNew) chmodSync(directory, 0o700);
  const { code } = await run('/usr/bin/test', ['-w', directory], { ...account, cwd: '/', output: 'discard' });
  if (code !== 0 && isNew) rmSync(directory, { recursive: true });
  return code === 0;
}
