/** Rules of the house that a linter does not see. */
import { dirname } from 'node:path';
import { describe, expect, it } from 'vitest';
import { filesBelow, isCode, linesOf } from './tree.js';

const files = filesBelow();
/** Data made by a program: long, and not read line by line. */
const written = files.filter(
  (path) => !/^(pnpm-lock\.yaml|db\/migrations\/|fixtures\/(captures|reference|readers)\/)/.test(path),
);

/** `path:line` of every line that matches. */
function places(pattern: RegExp, paths: string[]): string[] {
  return paths.flatMap((path) =>
    linesOf(path).flatMap((line, index) => (pattern.test(line) ? [`${path}:${String(index + 1)}`] : [])),
  );
}

describe('the tree', () => {
  it('holds no marker of unfinished work, since nobody comes back for it', () => {
    expect(
      places(new RegExp(`\\b(${['TO' + 'DO', 'FIX' + 'ME', 'XX' + 'X'].join('|')})\\b`), written),
    ).toEqual([]);
  });

  it('holds no path of one machine, since it runs on others', () => {
    const folders = ['work', 'root', 'home', 'tmp', 'Users'].join('|');
    expect(places(new RegExp(`(?<![\\w./*-])/(${folders})/\\w`), written)).toEqual([]);
  });

  it('names files and folders in kebab case, so that no file system confuses them', () => {
    const kebab = /^[a-z0-9]+(-[a-z0-9]+)*(\.[a-z0-9]+(-[a-z0-9]+)*)*$/;
    const misnamed = files.filter(isCode).filter((path) => path.split('/').some((part) => !kebab.test(part)));
    expect(misnamed).toEqual([]);
  });

  it('has no code file over 400 lines, since longer ones are not read', () => {
    expect(files.filter(isCode).filter((path) => linesOf(path).length > 401)).toEqual([]);
  });

  it('names the source of every fixture', () => {
    const documented = new Set(files.filter((path) => path.endsWith('/SOURCE.md')).map(dirname));
    const data = files.filter((path) => /^fixtures\/(?!src\/|test\/|scripts\/)[^/]+\//.test(path));
    const folders = [...new Set(data.map(dirname))];
    const hasSource = (folder: string): boolean =>
      documented.has(folder) || (folder.includes('/') && hasSource(dirname(folder)));
    expect(folders.filter((folder) => !hasSource(folder))).toEqual([]);
  });

  it('keeps registry addresses out of the lock file, so that any registry serves', () => {
    expect(places(/https?:\/\//, ['pnpm-lock.yaml'])).toEqual([]);
  });
});
