import { mkdir, mkdtemp, readdir, rm, symlink, utimes, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { removeStale } from './stale-files.js';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'stale-'));
});
afterEach(() => rm(folder, { recursive: true }));

it('removes files and folders of the age, and nothing younger', async () => {
  const anHourAgo = Date.now() / 1000 - 3600;
  await writeFile(join(folder, 'old'), 'x');
  await mkdir(join(folder, 'old-folder'));
  await writeFile(join(folder, 'old-folder', 'part'), 'x');
  await writeFile(join(folder, 'young'), 'x');
  for (const name of ['old', 'old-folder']) await utimes(join(folder, name), anHourAgo, anHourAgo);
  await removeStale(folder, 3600 * 1000);
  expect(await readdir(folder)).toEqual(['young']);
});

it('goes on where a listed file is gone, as one that another process removed', async () => {
  // A link to nothing is listed and cannot be looked at.
  await symlink(join(folder, 'gone'), join(folder, 'link'));
  await expect(removeStale(folder, 0)).resolves.toBeUndefined();
});
