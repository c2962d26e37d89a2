import { mkdtemp, readFile, rm, symlink, writeFile, readdir } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runCases, type CaseResults } from '../src/run-cases.js';
import { isMet, type Expected } from './judge.js';

interface Case {
  id: string;
  family?: number;
  expected: Record<string, Expected>;
}

const fixtures = fileURLToPath(new URL('../../../fixtures/', import.meta.url));

let folder: string;
let cases: Case[];
let outcome: CaseResults;

/** The reference records and the files of instruments in one folder, with one description. */
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'cases-'));
  for (const source of ['reference/records', 'readers']) {
    for (const name of await readdir(join(fixtures, source))) {
      if (/\.(csv|wav)$/.test(name)) await symlink(join(fixtures, source, name), join(folder, name));
    }
  }
  const signals = await described('reference/cases.json');
  const files = (await described('readers/cases.json')).map((one) => ({ ...one, family: 9 }));
  cases = [...signals, ...files];
  await writeFile(join(folder, 'cases.json'), JSON.stringify({ cases }));
  outcome = await runCases(folder);
}, 300_000);
afterAll(() => rm(folder, { recursive: true }));

async function described(name: string): Promise<Case[]> {
  return (JSON.parse(await readFile(join(fixtures, name), 'utf8')) as { cases: Case[] }).cases;
}

// The expected values are closed forms and the formulas of the standards: fixtures/reference/SOURCE.md.
describe('the reference cases', () => {
  it.each([1, 2, 3, 4, 5, 6, 7, 8, 9, 10])('of family %i come out as they must', (family) => {
    const misses = cases
      .filter((one) => one.family === family)
      .flatMap(({ id, expected }) =>
        missesOf(expected, outcome.results[id] ?? {}).map((name) => `${id} ${name}`),
      );
    expect(misses).toEqual([]);
  });

  it('are all served, but for textbook values that no record belongs to', () => {
    expect(outcome.leftOut).toEqual([{ id: 'F3-P14', reason: 'the case has no file' }]);
  });
});

function missesOf(expected: Record<string, Expected>, got: Record<string, unknown>): string[] {
  return Object.entries(expected)
    .filter(([name, { need, when = {} }]) => {
      const applies = Object.entries(when).every(([other, text]) => got[other] === text);
      return applies && !(need === 'extra' && got[name] === undefined);
    })
    .filter(([name, one]) => !isMet(one, got[name]))
    .map(([name]) => name);
}
