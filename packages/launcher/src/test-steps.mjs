/** The steps of `npm test`: the house rules, then the tests of every package. */
import { existsSync, readFileSync, rmSync } from 'node:fs';
import { basename, join } from 'node:path';
import { build } from './build.mjs';
import { workspaceFolders } from './install.mjs';
import { readJson, rootDirectory } from './paths.mjs';
import { pnpm } from './pnpm.mjs';
import { run } from './processes.mjs';
import { tallyOfReport } from './tally.mjs';

/** @typedef {'checks' | 'unit' | 'integration' | 'browser'} Tier */
/** @typedef {{ name: string, run: () => Promise<import('./tally.mjs').Tally> }} Step */

/** @type {Tier[]} */
export const tiers = ['checks', 'unit', 'integration', 'browser'];

const scriptOfTier = { unit: 'test', integration: 'test:integration', browser: 'test:browser' };
const timeoutMs = 15 * 60_000;

/** @returns {Step} counts as one test */
export function buildStep() {
  return { name: 'build', run: () => single(build()) };
}

/**
 * @param {Tier} tier
 * @param {NodeJS.ProcessEnv} env
 * @returns {Step[]}
 */
export function stepsOfTier(tier, env) {
  if (tier === 'checks') return checks(env);
  const script = scriptOfTier[tier];
  return workspaceFolders().flatMap((folder) => {
    const command = readJson(`${folder}/package.json`).scripts?.[script];
    return command === undefined ? [] : [vitestStep(folder, tier, command, env)];
  });
}

/**
 * @param {NodeJS.ProcessEnv} env
 * @returns {Step[]} each counts as one test
 */
function checks(env) {
  const tool = (/** @type {string} */ name, /** @type {string[]} */ args) =>
    run(join(rootDirectory, 'node_modules/.bin', name), args, { cwd: rootDirectory, env, timeoutMs });
  const types = ['exec', 'turbo', 'run', 'typecheck', '--continue', '--output-logs=errors-only'];
  return [
    { name: 'format', run: () => single(tool('prettier', ['--check', '--log-level', 'warn', '.'])) },
    { name: 'lint', run: () => single(tool('eslint', ['.', '--max-warnings', '0'])) },
    { name: 'types', run: () => single(pnpm(types, { env, timeoutMs })) },
    { name: 'dead code', run: () => single(tool('knip', ['--no-progress'])) },
  ];
}

/**
 * @param {ReturnType<typeof run>} running
 * @returns {Promise<import('./tally.mjs').Tally>}
 */
async function single(running) {
  const { code, output } = await running;
  if (code !== 0) console.log(output);
  return { passed: code === 0 ? 1 : 0, failed: code === 0 ? 0 : 1, skipped: 0 };
}

/**
 * Runs the package's own test script with a report beside it, and counts its tests.
 * @param {string} folder
 * @param {Tier} tier
 * @param {string} command the script, a call of vitest
 * @param {NodeJS.ProcessEnv} env
 * @returns {Step}
 */
function vitestStep(folder, tier, command, env) {
  const [program = '', ...args] = command.split(' ');
  const file = join(env.REPORT_DIR ?? rootDirectory, `${basename(folder)}-${tier}.json`);
  const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${file}`];
  return {
    name: `${tier} ${folder}`,
    run: async () => {
      rmSync(file, { force: true });
      const cwd = join(rootDirectory, folder);
      const { code } = await run(join(cwd, 'node_modules/.bin', program), [...args, ...reporters], {
        cwd,
        env,
        timeoutMs,
      });
      return tallyOfReport(existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : undefined, code);
    },
  };
}
