/** The oldest Node.js that runs the product. */
import { LauncherError } from './lifecycle.mjs';

/**
 * @param {string} [version] of the running Node.js, as `20.19.0`
 * @throws {LauncherError} when it is older than 20.19
 */
export function requireNodeVersion(version = process.versions.node) {
  const [major = 0, minor = 0] = version.split('.').map(Number);
  if (major > 20 || (major === 20 && minor >= 19)) return;
  throw new LauncherError(
    `Overtally needs Node.js 20.19 or newer; this is ${version}.\nInstall a newer Node.js (https://nodejs.org) and run the command again.`,
  );
}
