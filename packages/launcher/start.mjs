/** `npm start`: from a fresh checkout to the running product. */
import { localAddress, startApi, waitUntilHealthy } from './src/api.mjs';
import { buildAll } from './src/build.mjs';
import { productDatabase } from './src/database.mjs';
import { LauncherError, runCommand } from './src/lifecycle.mjs';
import { setUp } from './src/set-up.mjs';
import { demoPeople, welcomeText } from './src/welcome.mjs';

/** @returns {Promise<never>} it ends by a signal or a failure */
async function start() {
  const { dataDirectory, host, port } = await setUp();
  await buildAll();
  const databaseUrl = await productDatabase(dataDirectory);
  const api = startApi({ databaseUrl, dataDirectory, host, port });
  const address = localAddress(host, port);
  await waitUntilHealthy(address, api);
  console.log(welcomeText(address, await demoPeople(host)));

  const code = await api.exited;
  throw new LauncherError(`The server ended unexpectedly (exit code ${code}, see above).`);
}

runCommand(start, { exitCodeOnSignal: 0 });
