/** `npm test`: everything a change must pass, on a throw-away database. `npm test -- unit` runs one tier. */
import { ensureDebianPackages } from './src/debian.mjs';
import { installWorkspace } from './src/install.mjs';
import { LauncherError, runCommand, stop } from './src/lifecycle.mjs';
import { requireNodeVersion } from './src/node-version.mjs';
import { sumTallies, tallyLine } from './src/tally.mjs';
import { testEnvironment } from './src/test-environment.mjs';
import { buildStep, stepsOfTier, tiers } from './src/test-steps.mjs';

/** @returns {import('./src/test-steps.mjs').Tier[]} those named on the command line, else all */
function chosenTiers() {
  const asked = process.argv.slice(2);
  const unknown = asked.filter((name) => !tiers.some((tier) => tier === name));
  if (unknown.length > 0)
    throw new LauncherError(`Unknown: ${unknown.join(', ')}. Tiers: ${tiers.join(', ')}.`);
  return asked.length === 0 ? tiers : tiers.filter((tier) => asked.includes(tier));
}

/** @returns {Promise<NodeJS.ProcessEnv>} */
async function prepare() {
  requireNodeVersion();
  await ensureDebianPackages(['postgresql', 'chromium', 'poppler-utils']);
  await installWorkspace();
  return testEnvironment();
}

/** @param {import('./src/test-steps.mjs').Step} step */
async function perform({ name, run }) {
  console.log(`\n── ${name}`);
  const begin = Date.now();
  const tally = await run();
  const summary = `${name}: ${tallyLine(tally)} (${((Date.now() - begin) / 1000).toFixed(1)} s)`;
  console.log(summary);
  return { tally, summary };
}

/**
 * Runs steps in order; lint, the longest of the checks, goes beside the others, since each keeps one core busy.
 * @param {import('./src/test-steps.mjs').Step[]} steps
 */
async function performInLanes(steps) {
  const lint = steps.filter(({ name }) => name === 'lint');
  const others = steps.filter(({ name }) => name !== 'lint');
  const lanes = [lint, others].map(async (lane) => {
    const results = [];
    for (const step of lane) results.push(await perform(step));
    return results;
  });
  return (await Promise.all(lanes)).flat();
}

/** Builds, then runs the steps of the chosen tiers; a step that fails does not keep the next from running. */
async function performAll() {
  const chosen = chosenTiers();
  const env = await prepare();
  const results = [await perform(buildStep())];
  if (results[0]?.tally.failed !== 0) return results;
  for (const tier of chosen) results.push(...(await performInLanes(stepsOfTier(tier, env))));
  return results;
}

async function test() {
  const results = await performAll().catch((error) => {
    console.error(error instanceof LauncherError ? error.message : error);
    return [{ tally: { passed: 0, failed: 1, skipped: 0 }, summary: 'set-up: failed, see above' }];
  });
  await stop();
  const total = sumTallies(results.map(({ tally }) => tally));
  console.log(`\n${results.map(({ summary }) => `  ${summary}`).join('\n')}\n`);
  console.log(tallyLine(total));
  return total.failed > 0 || total.passed === 0 ? 1 : 0;
}

runCommand(test, { exitCodeOnSignal: 1 });
