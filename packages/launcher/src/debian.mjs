/** Programs that come from Debian: installs what is missing when it may, and says what to run otherwise. */
import { existsSync } from 'node:fs';
import { LauncherError } from './lifecycle.mjs';
import { newestPostgresBinaries } from './postgres-binaries.mjs';
import { run } from './processes.mjs';

/** @typedef {'postgresql' | 'chromium' | 'poppler-utils'} DebianPackage */

/** @type {Record<DebianPackage, () => boolean>} */
const isPresent = {
  postgresql: () => newestPostgresBinaries() !== undefined,
  chromium: () => existsSync(chromiumPath()),
  'poppler-utils': () => existsSync('/usr/bin/pdftotext'),
};

/** @returns {string} the browser that the browser tests drive */
export function chromiumPath() {
  return process.env.CHROMIUM_PATH || '/usr/bin/chromium';
}

/**
 * Installs those of the given packages that are missing.
 * @param {DebianPackage[]} wanted
 * @throws {LauncherError} when the machine or the user cannot install them; names the command to run
 */
export async function ensureDebianPackages(wanted) {
  const missing = wanted.filter((name) => !isPresent[name]());
  if (missing.length === 0) return;
  const byHand = `Install ${missing.join(', ')} and run the command again:\n  sudo apt-get update && sudo apt-get install -y ${missing.join(' ')}`;
  if (!existsSync('/usr/bin/apt-get'))
    throw new LauncherError(`${byHand}\n(or what your system uses in place of apt-get)`);
  const root = await rootCommand();
  if (root === undefined) throw new LauncherError(`This user may not install packages. ${byHand}`);

  console.log(`Installing from Debian: ${missing.join(', ')} …`);
  if (missing.includes('postgresql')) await declineMainCluster(root);
  const update = await run(...asRoot(root, ['apt-get', '-q', 'update']), { output: 'collect' });
  if (update.code !== 0) throw new LauncherError(`apt-get update failed:\n${update.output}\n${byHand}`);
  const options = ['-o', 'DPkg::Lock::Timeout=300', '-o', 'Dpkg::Options::=--force-confold'];
  const install = ['apt-get', ...options, '-q', 'install', '-y', '--no-install-recommends', ...missing];
  const installed = await run(...asRoot(root, ['env', 'DEBIAN_FRONTEND=noninteractive', ...install]), {
    output: 'collect',
  });
  if (installed.code !== 0 || !missing.every((name) => isPresent[name]())) {
    throw new LauncherError(`apt-get install failed:\n${installed.output}\n${byHand}`);
  }
}

/**
 * Keeps the Debian package from making and starting a cluster of its own on port 5432. A file that is
 * already there is the administrator's and stays.
 * @param {string[]} root
 */
async function declineMainCluster(root) {
  const file = '/etc/postgresql-common/createcluster.conf';
  if (existsSync(file)) return;
  const script = `mkdir -p /etc/postgresql-common && echo 'create_main_cluster = false' > ${file}`;
  const { code, output } = await run(...asRoot(root, ['sh', '-c', script]), { output: 'collect' });
  if (code !== 0) throw new LauncherError(`${file} could not be written:\n${output}`);
}

/** @returns {Promise<string[] | undefined>} what to put before a command to run it as root */
async function rootCommand() {
  if (process.getuid?.() === 0) return [];
  const { code } = await run('sudo', ['-n', 'true'], { output: 'discard' });
  return code === 0 ? ['sudo', '-n'] : undefined;
}

/**
 * @param {string[]} root
 * @param {string[]} command
 * @returns {[string, string[]]}
 */
function asRoot(root, command) {
  const [program = '', ...args] = [...root, ...command];
  return [program, args];
}
