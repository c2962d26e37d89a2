/** `pnpm dev`: both sides with hot reload. Vite serves the web and hands /api on to the server. */
import { join } from 'node:path';
import { localAddress, startApi, waitUntilHealthy } from './src/api.mjs';
import { build } from './src/build.mjs';
import { productDatabase } from './src/database.mjs';
import { LauncherError, runCommand } from './src/lifecycle.mjs';
import { rootDirectory } from './src/paths.mjs';
import { choosePort } from './src/ports.mjs';
import { startService } from './src/processes.mjs';
import { setUp } from './src/set-up.mjs';
import { nextSourceState, sourceState } from './src/source-watch.mjs';
import { demoPeople, welcomeText } from './src/welcome.mjs';

/** @returns {Promise<boolean>} whether the server and its packages compile; says what does not */
async function buildServer() {
  console.log('Building the server …');
  const { code, output } = await build(['!@overtally/web']);
  if (code !== 0) console.error(output);
  return code === 0;
}

/**
 * @param {number} apiPort
 * @param {number} webPort
 */
function startVite(apiPort, webPort) {
  const web = join(rootDirectory, 'apps/web');
  const args = ['--host', '127.0.0.1', '--port', String(webPort), '--strictPort', '--clearScreen', 'false'];
  const env = { ...process.env, API_PORT: String(apiPort) };
  return startService(join(web, 'node_modules/.bin/vite'), args, { cwd: web, env });
}

/**
 * Starts the server, and starts it anew after every change that compiles.
 * @param {import('./src/api.mjs').ApiOptions} server
 * @returns {Promise<never>}
 */
async function serveNewest(server) {
  let api = startApi(server);
  await waitUntilHealthy(localAddress(server.host, server.port), api);
  for (let seen = sourceState(); ;) {
    seen = await nextSourceState(seen);
    if (!(await buildServer())) continue;
    await api.stop();
    api = startApi(server);
    console.log('The server starts anew.');
  }
}

/** @returns {Promise<never>} it ends by a signal or a failure */
async function dev() {
  const { dataDirectory, host, port } = await setUp();
  const webHost = '127.0.0.1';
  const asked = process.env.WEB_PORT;
  const webPort = await choosePort({ asked, fallback: 5173, host: webHost, setting: 'WEB_PORT' });
  const webAddress = localAddress(webHost, webPort);
  process.env.PUBLIC_URL ||= webAddress;
  if (!(await buildServer())) throw new LauncherError('Mend the build and start again.');

  const databaseUrl = await productDatabase(dataDirectory);
  const serving = serveNewest({ databaseUrl, dataDirectory, host, port });
  const vite = startVite(port, webPort);
  console.log(welcomeText(webAddress, await demoPeople(host)));
  const code = await Promise.race([vite.exited, serving]);
  throw new LauncherError(`Vite ended unexpectedly (exit code ${code}, see above).`);
}

runCommand(dev, { exitCodeOnSignal: 0 });
