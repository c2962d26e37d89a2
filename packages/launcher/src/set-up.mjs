/** What `npm start` and `pnpm dev` do before anything runs. */
import { ensureDebianPackages } from './debian.mjs';
import { installWorkspace } from './install.mjs';
import { takeDataDirectory } from './instance-lock.mjs';
import { requireNodeVersion } from './node-version.mjs';
import { dataDirectory as openDataDirectory } from './paths.mjs';
import { choosePort } from './ports.mjs';

/**
 * Takes the data folder, finds a port for the server, and gets what is missing on the machine.
 * @returns {Promise<{ dataDirectory: string, host: string, port: number }>}
 * @throws {import('./lifecycle.mjs').LauncherError}
 */
export async function setUp() {
  requireNodeVersion();
  const dataDirectory = openDataDirectory();
  takeDataDirectory(dataDirectory);
  const host = process.env.HOST || '127.0.0.1';
  const port = await choosePort({ asked: process.env.PORT, fallback: 4310, host, setting: 'PORT' });
  if (!process.env.DATABASE_URL) await ensureDebianPackages(['postgresql']);
  await installWorkspace();
  return { dataDirectory, host, port };
}
