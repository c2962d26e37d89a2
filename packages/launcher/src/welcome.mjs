/** What the user reads once the product runs: the address and the demo sign-ins. */
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { demoSetting } from './demo-setting.mjs';
import { rootDirectory } from './paths.mjs';

/** @typedef {{ name: string, email: string, password: string, role: string }} DemoPerson */

/**
 * @param {string} address
 * @param {DemoPerson[]} people
 * @returns {string}
 */
export function welcomeText(address, people) {
  const lines = ['', `Overtally is running at ${address}`];
  if (people.length > 0) {
    const width = (/** @type {keyof DemoPerson} */ key) =>
      Math.max(...people.map((person) => person[key].length));
    lines.push('', 'Demo sign-ins:');
    for (const { role, email, password } of people) {
      lines.push(`  ${role.padEnd(width('role'))}  ${email.padEnd(width('email'))}  ${password}`);
    }
  }
  if (people.length === 0 && !process.env.DEMO && !process.env.ADMIN_EMAIL) {
    lines.push('', 'No demo sign-ins, since others can reach this address; DEMO=on allows them.');
    lines.push('ADMIN_EMAIL and ADMIN_PASSWORD make the first administrator.');
  }
  lines.push('', 'Stop with Ctrl-C.', '');
  return lines.join('\n');
}

/**
 * @param {string} host the address the server listens on
 * @returns {Promise<DemoPerson[]>} the people of the demo project; nobody without the demonstration
 */
export async function demoPeople(host) {
  if (demoSetting(process.env, host) === 'off') return [];
  const built = pathToFileURL(join(rootDirectory, 'fixtures/dist/index.js')).href;
  return (await import(built)).demoPeople;
}
