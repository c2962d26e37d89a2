/**
 * A private PostgreSQL cluster on the loopback interface. No other cluster of the machine is touched: it
 * has its own folder, its own port, no socket file and a password of its own.
 */
import { randomBytes } from 'node:crypto';
import { chownSync, existsSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { LauncherError, onStop, refuseWhenStopping } from './lifecycle.mjs';
import { probePort } from './ports.mjs';
import { newestPostgresBinaries, postgresBinariesOfVersion } from './postgres-binaries.mjs';
import { run } from './processes.mjs';

/**
 * @typedef {object} Cluster
 * @property {(database: string) => string} url the address of a database of the cluster
 * @property {(database: string) => Promise<void>} ensureDatabase makes the database if it is absent
 */

const superuser = 'app';
const host = '127.0.0.1';

/**
 * Starts the cluster in the given folder, making it first if need be. It stops with the launcher.
 * @param {import('./cluster-home.mjs').ClusterHome} home
 * @param {{ settings?: string[] }} [options] settings: `name=value`, on top of the defaults
 * @returns {Promise<Cluster>}
 * @throws {LauncherError} with the end of the server's log when it does not start
 */
export async function startCluster(home, { settings = [] } = {}) {
  const data = join(home.directory, 'data');
  const log = join(home.directory, 'server.log');
  const password = keptText(home, 'password', () => randomBytes(18).toString('hex'));
  const tools = toolsFor(home, data, password);
  if (!existsSync(data)) await initialise(home, data, tools);
  await endLeftover(data, tools);

  const port = await keptPort(home);
  const all = [`listen_addresses=${host}`, 'unix_socket_directories=', ...settings];
  const serverOptions = [`-p ${port}`, ...all.map((setting) => `-c ${setting}`)].join(' ');
  refuseWhenStopping();
  // Never a pipe: the server would keep it open and the call would not return.
  const starting = tools('pg_ctl', ['-D', data, '-l', log, '-w', '-o', serverOptions, 'start'], 'discard');
  onStop(async () => {
    await starting;
    await tools('pg_ctl', ['-D', data, '-m', 'fast', '-w', 'stop'], 'discard');
  });
  const started = await starting;
  if (started.code !== 0) {
    const tail = existsSync(log) ? readFileSync(log, 'utf8').split('\n').slice(-15).join('\n') : '';
    throw new LauncherError(`The database did not start. The end of ${log}:\n${tail}`);
  }
  const connection = ['-h', host, '-p', String(port), '-U', superuser];
  return {
    url: (database) => `postgresql://${superuser}:${password}@${host}:${port}/${database}`,
    ensureDatabase: (database) => ensureDatabase(database, connection, tools),
  };
}

/**
 * @param {import('./cluster-home.mjs').ClusterHome} home
 * @param {string} data
 * @param {string} password
 * @returns {(program: string, args: string[], output: 'collect' | 'discard') => ReturnType<typeof run>}
 */
function toolsFor(home, data, password) {
  const versionFile = join(data, 'PG_VERSION');
  const version = existsSync(versionFile) ? Number(readFileSync(versionFile, 'utf8')) : undefined;
  const binaries = version === undefined ? newestPostgresBinaries() : postgresBinariesOfVersion(version);
  if (binaries === undefined) {
    throw new LauncherError(
      `The database in ${data} was made by PostgreSQL ${version}, which is not installed: install postgresql-${version}.`,
    );
  }
  const env = { PATH: process.env.PATH, HOME: home.directory, LC_ALL: 'C.UTF-8', PGPASSWORD: password };
  return (program, args, output) =>
    run(join(binaries, program), args, {
      ...home.account,
      cwd: home.directory,
      env,
      output,
      finishOnStop: true,
    });
}

/**
 * Makes the cluster under another name first, so that one half made is never used.
 * @param {import('./cluster-home.mjs').ClusterHome} home
 * @param {string} data
 * @param {ReturnType<typeof toolsFor>} tools
 */
async function initialise(home, data, tools) {
  const unfinished = `${data}.new`;
  rmSync(unfinished, { recursive: true, force: true });
  const access = ['--auth=scram-sha-256', `--pwfile=${join(home.directory, 'password')}`];
  const args = ['-D', unfinished, '-U', superuser, ...access, '-E', 'UTF8', '--locale=C.UTF-8', '--no-sync'];
  const { code, output } = await tools('initdb', args, 'collect');
  if (code !== 0) throw new LauncherError(`The database could not be made in ${home.directory}:\n${output}`);
  renameSync(unfinished, data);
}

/**
 * Stops a server that a killed launcher left running, and removes the note of one that is gone. The
 * process id in the note may by now belong to another program, which must not be signalled.
 * @param {string} data
 * @param {ReturnType<typeof toolsFor>} tools
 */
async function endLeftover(data, tools) {
  const note = join(data, 'postmaster.pid');
  if (!existsSync(note)) return;
  const pid = readFileSync(note, 'utf8').split('\n')[0] ?? '';
  const commandLine = `/proc/${pid}/cmdline`;
  if (existsSync(commandLine) && readFileSync(commandLine, 'utf8').split('\0').includes(data)) {
    await tools('pg_ctl', ['-D', data, '-m', 'fast', '-w', 'stop'], 'discard');
  } else {
    rmSync(note);
  }
}

/**
 * A line of text kept beside the cluster for its account alone.
 * @param {import('./cluster-home.mjs').ClusterHome} home
 * @param {string} name
 * @param {() => string} make
 */
function keptText({ directory, account }, name, make) {
  const file = join(directory, name);
  if (!existsSync(file)) {
    writeFileSync(file, `${make()}\n`, { mode: 0o600 });
    if (account.uid !== undefined && account.gid !== undefined) chownSync(file, account.uid, account.gid);
  }
  return readFileSync(file, 'utf8').trim();
}

/**
 * The port of the last start, or another free one when it is taken.
 * @param {import('./cluster-home.mjs').ClusterHome} home
 */
async function keptPort({ directory }) {
  const file = join(directory, 'port');
  const last = existsSync(file) ? Number(readFileSync(file, 'utf8')) : 0;
  const port = (await probePort(last, host)) ?? (await probePort(0, host));
  writeFileSync(file, `${port}\n`);
  return port;
}

/**
 * @param {string} database
 * @param {string[]} connection
 * @param {ReturnType<typeof toolsFor>} tools
 */
async function ensureDatabase(database, connection, tools) {
  const query = `select 1 from pg_database where datname = '${database}'`;
  const found = await tools('psql', [...connection, '-d', 'postgres', '-tAc', query], 'collect');
  if (found.code === 0 && found.output.trim() === '1') return;
  const created = await tools('createdb', [...connection, database], 'collect');
  if (created.code !== 0)
    throw new LauncherError(`The database ${database} could not be made:\n${created.output}`);
}
