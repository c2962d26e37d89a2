import { inspect } from 'node:util';
import { runCases } from './run-cases.js';

const usage = `Usage: pnpm cases DIR

Runs the reference cases that DIR/cases.json describes and prints one JSON object on standard output:
{ "<case id>": { "<quantity>": value } }. Cases that cannot be served are left out and named on standard error.
`;

/** @returns the exit code: 0 when every case was served or left out for a stated reason, 1 otherwise, 2 for a wrong call */
export async function main(args: readonly string[]): Promise<number> {
  const [folder, ...rest] = args;
  if (folder === undefined || folder.startsWith('-') || rest.length > 0) {
    process.stderr.write(usage);
    return 2;
  }
  const { results, leftOut, failed } = await runCases(folder);
  for (const { id, reason } of leftOut) process.stderr.write(`${id} left out: ${reason}\n`);
  for (const { id, error } of failed) process.stderr.write(`${id} failed: ${inspect(error)}\n`);
  process.stdout.write(`${JSON.stringify(results, null, 1)}\n`);
  return failed.length === 0 ? 0 : 1;
}
