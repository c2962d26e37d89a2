import { expect, it } from 'vitest';
import { paths, safeNext } from './paths.js';

it('keeps the wanted address through the sign-in page', () => {
  const wanted = paths.overlay('p', ['a', 'b']);
  const next = new URL(paths.signIn(wanted), 'http://localhost').searchParams.get('next');
  expect(safeNext(next)).toBe('/projects/p/overlay?r=a,b');
});

it.each([null, 'https://elsewhere.example', '//elsewhere.example', '/\\elsewhere.example', 'projects'])(
  'leads to the projects instead of %s',
  (next) => expect(safeNext(next)).toBe('/projects'),
);
