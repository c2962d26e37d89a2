/** Builds all packages in order; turbo skips what has not changed. */
import { LauncherError } from './lifecycle.mjs';
import { pnpm } from './pnpm.mjs';

/**
 * @param {string[]} [filters] turbo's package filters; all packages by default
 * @returns {Promise<{ code: number, output: string }>}
 */
export function build(filters = []) {
  const selection = filters.map((filter) => `--filter=${filter}`);
  return pnpm(['exec', 'turbo', 'run', 'build', '--output-logs=errors-only', '--no-color', ...selection], {
    output: 'collect',
  });
}

/** @throws {LauncherError} with the compiler's messages */
export async function buildAll() {
  console.log('Building …');
  const { code, output } = await build();
  if (code !== 0) throw new LauncherError(`The build failed:\n${output}`);
}
