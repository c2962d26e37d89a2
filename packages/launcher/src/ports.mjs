/** TCP ports: which are free, and which one a service gets. */
import { createServer } from 'node:net';
import { LauncherError } from './lifecycle.mjs';

/**
 * @param {number} port 0 asks the system for any free one
 * @param {string} host
 * @returns {Promise<number | undefined>} the port when it is free
 */
export function probePort(port, host) {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', (/** @type {NodeJS.ErrnoException} */ error) => {
      if (error.code === 'EADDRINUSE') resolve(undefined);
      else reject(new LauncherError(`Cannot listen on ${host}, port ${port}: ${error.message}`));
    });
    server.listen({ port, host, exclusive: true }, () => {
      const address = server.address();
      server.close(() => resolve(typeof address === 'object' && address !== null ? address.port : port));
    });
  });
}

/**
 * Chooses the port of a service: the one asked for, or from the default upwards the first free one.
 * @param {{ asked: string | undefined, fallback: number, host: string, setting: string }} options
 *   asked: the value of the environment variable named by setting
 * @throws {LauncherError} when the port asked for is not a port or is taken
 */
export async function choosePort({ asked, fallback, host, setting }) {
  if (asked) {
    const port = Number(asked);
    if (!Number.isInteger(port) || port < 0 || port > 65535) {
      throw new LauncherError(`${setting}=${asked} is not a port number (0 to 65535; 0 takes any free one).`);
    }
    const free = await probePort(port, host);
    if (free === undefined) {
      throw new LauncherError(
        `${setting}=${port} is in use on ${host}. Set ${setting} to a free port, or leave it out.`,
      );
    }
    return free;
  }
  for (let port = fallback; port < fallback + 100; port += 1) {
    if ((await probePort(port, host)) !== undefined) return port;
  }
  throw new LauncherError(
    `No free port from ${fallback} to ${fallback + 99} on ${host}. Set ${setting} to a free one.`,
  );
}
