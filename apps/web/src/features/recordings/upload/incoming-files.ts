import type { IncomingFile } from '../upload-item.js';

/** Files of operating systems that no one means to add. */
const clutter = new Set(['thumbs.db', 'ehthumbs.db', 'desktop.ini', 'icon\r', '.ds_store']);
const clutterFolders = new Set(['__macosx', '$recycle.bin', 'system volume information']);

/**
 * Dropped or chosen files with their place in the folder they came in. What operating systems leave in folders is
 * left out, and within a folder all that is hidden.
 */
export function incomingFiles(files: readonly File[]): IncomingFile[] {
  return files.map((file) => ({ file, path: pathOf(file) })).filter(({ path }) => !isClutter(path));
}

function pathOf(file: File & { relativePath?: string }): string {
  const path = file.relativePath || file.webkitRelativePath || file.name;
  return path.replace(/^(\.?\/)+/, '');
}

function isClutter(path: string): boolean {
  const parts = path.toLowerCase().split('/');
  const name = parts.at(-1) ?? '';
  if (clutter.has(name) || parts.some((part) => clutterFolders.has(part))) return true;
  return parts.length > 1 && parts.some((part) => part.startsWith('.') || part.startsWith('~$'));
}
