/** `npm start`: from a fresh checkout to the running product. */
import { localAddress, startApi, waitUntilHealthy } from './src/api.mjs';
import { buildAll } from './src/build.mjs';
import { productDatabase } from './src/database.mjs';
import { ensureDebianPackages } from './src/debian.mjs';
import { installWorkspace } from './src/install.mjs';
import { takeDataDirectory } from './src/instance-lock.mjs';
import { LauncherError, runCommand } from './src/lifecycle.mjs';
import { requireNodeVersion } from './src/node-version.mjs';
import { dataDirectory as openDataDirectory } from './src/paths.mjs';
import { choosePort } from './src/ports.mjs';
import { demoPeople, welcomeText } from './src/welcome.mjs';

/** @returns {Promise<never>} it ends by a signal or a failure */
async function start() {
  requireNodeVersion();
  const dataDirectory = openDataDirectory();
  takeDataDirectory(dataDirectory);
  const host = process.env.HOST || '127.0.0.1';
  const port = await choosePort({ asked: process.env.PORT, fallback: 4310, host, setting: 'PORT' });

  if (!process.env.DATABASE_URL) await ensureDebianPackages(['postgresql']);
  await installWorkspace();
  await buildAll();
  const databaseUrl = await productDatabase(dataDirectory);

  const api = startApi({ databaseUrl, dataDirectory, host, port });
  const address = localAddress(host, port);
  await waitUntilHealthy(address, api);
  console.log(welcomeText(address, await demoPeople()));

  const code = await api.exited;
  throw new LauncherError(`The server ended unexpectedly (exit code ${code}, see above).`);
}

runCommand(start, { exitCodeOnSignal: 0 });
