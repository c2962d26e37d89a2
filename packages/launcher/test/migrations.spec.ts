/** The committed migrations lead to the schema that the code declares. */
import { spawnSync } from 'node:child_process';
import { cpSync, mkdtempSync, rmSync } from 'node:fs';
import { join, relative } from 'node:path';
import { afterAll, expect, it } from 'vitest';
import { root } from './tree.js';

const db = join(root, 'db');
const copy = mkdtempSync(join(db, 'node_modules', '.migrations-'));
afterAll(() => {
  rmSync(copy, { recursive: true });
});

it('a schema change comes with its migration', () => {
  cpSync(join(db, 'migrations'), copy, { recursive: true });
  const schema = ['--dialect=postgresql', '--casing=snake_case', '--schema=./src/schema/index.ts'];
  const { stdout, stderr } = spawnSync(
    join(db, 'node_modules/.bin/drizzle-kit'),
    ['generate', ...schema, `--out=${relative(db, copy)}`],
    { cwd: db, encoding: 'utf8' },
  );
  expect(`${stdout}${stderr}`, 'run: pnpm --filter @overtally/db generate --name <what_changed>').toContain(
    'No schema changes',
  );
});
