import { expect, it } from 'vitest';
import { incomingFiles } from './incoming-files.js';

const at = (path: string) =>
  Object.assign(new File(['x'], path.split('/').at(-1) ?? ''), { relativePath: path });

it('keeps the place of a file in its folder and leaves out what nobody means to add', () => {
  const paths = [
    ...['./single.csv', '/monday/cabinet 3/a.csv', './.kept-as-it-was-named.csv'],
    ...['/monday/.DS_Store', '/monday/Thumbs.db', '/monday/.git/config', '/monday/~$notes.csv'],
    ...['/__MACOSX/monday/._a.csv', '/monday/desktop.ini', './Thumbs.db'],
  ];
  expect(incomingFiles(paths.map(at)).map(({ path }) => path)).toEqual([
    ...['single.csv', 'monday/cabinet 3/a.csv', '.kept-as-it-was-named.csv'],
  ]);
});
