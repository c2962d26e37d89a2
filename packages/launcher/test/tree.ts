/** The files of the checkout as a reader finds them. */
import { readdirSync, readFileSync } from 'node:fs';
import { extname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = fileURLToPath(new URL('../../..', import.meta.url));

const madeByTools = new Set(['node_modules', 'dist', '.turbo', '.data', '.git', 'coverage', 'test-reports']);
const binary = new Set([
  '.wav',
  '.npy',
  '.png',
  '.jpg',
  '.ico',
  '.pdf',
  '.gz',
  '.bin',
  '.woff',
  '.woff2',
  '.ttf',
]);

/** All files below a folder, as paths from the top of the checkout. */
export function filesBelow(folder = ''): string[] {
  return readdirSync(join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    if (madeByTools.has(entry.name)) return [];
    const path = folder === '' ? entry.name : `${folder}/${entry.name}`;
    if (entry.isDirectory()) return filesBelow(path);
    return entry.isFile() ? [path] : [];
  });
}

/** Whether a file is code that people write here. */
export function isCode(path: string): boolean {
  return /\.(ts|tsx|mjs|js)$/.test(path);
}

/** The lines of a text file; none for a binary one. */
export function linesOf(path: string): string[] {
  return binary.has(extname(path)) ? [] : readFileSync(join(root, path), 'utf8').split('\n');
}
