/** What the test steps find in their environment: a throw-away database, a browser, a folder for reports. */
import { mkdirSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { temporaryClusterHome } from './cluster-home.mjs';
import { startCluster } from './cluster.mjs';
import { chromiumPath } from './debian.mjs';
import { onStop } from './lifecycle.mjs';
import { dataDirectory, rootDirectory } from './paths.mjs';

/** Settings of an installation, which must not reach a test. */
const productSettings =
  /^(DATABASE_URL|DATA_DIR|PORT|HOST|STORAGE|S3_.*|SMTP_URL|WORKER|DEMO|SESSION_SECRET|PUBLIC_URL|TRUST_PROXY|ADMIN_.*)$/;

/** @returns {string} the folder that takes the reports of a test run (REPORT_DIR) */
export function reportDirectory() {
  const { REPORT_DIR } = process.env;
  const directory = REPORT_DIR ? resolve(rootDirectory, REPORT_DIR) : join(dataDirectory(), 'test-reports');
  mkdirSync(directory, { recursive: true });
  return directory;
}

/** @returns {Promise<NodeJS.ProcessEnv>} */
export async function testEnvironment() {
  const inherited = Object.entries(process.env).filter(([name]) => !productSettings.test(name));
  return {
    ...Object.fromEntries(inherited),
    TEST_DATABASE_URL: process.env.TEST_DATABASE_URL || (await throwAwayDatabase()),
    CHROMIUM_PATH: chromiumPath(),
    REPORT_DIR: reportDirectory(),
  };
}

/** @returns {Promise<string>} the administrator's address of a cluster that vanishes with the launcher */
async function throwAwayDatabase() {
  const home = await temporaryClusterHome();
  onStop(() => rmSync(home.directory, { recursive: true, force: true }));
  const quick = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off', 'max_connections=200'];
  const cluster = await startCluster(home, { settings: quick });
  return cluster.url('postgres');
}
