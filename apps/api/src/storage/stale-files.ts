import { readdir, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';

/** Removes what lies in `folder` and was last written `ageMs` before `now` or earlier; another process may do the same. */
export async function removeStale(folder: string, ageMs: number, now = Date.now()): Promise<void> {
  for (const name of await readdir(folder)) {
    const path = join(folder, name);
    const writtenAt = await modifiedAt(path);
    if (writtenAt !== undefined && now - writtenAt >= ageMs) await rm(path, { recursive: true, force: true });
  }
}

/** Moment of the last write in ms since 1970; undefined when the file went away meanwhile. */
export async function modifiedAt(path: string): Promise<number | undefined> {
  try {
    return (await stat(path)).mtimeMs;
  } catch (error) {
    if (error instanceof Error && 'code' in error && error.code === 'ENOENT') return undefined;
    throw error;
  }
}
