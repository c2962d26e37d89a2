import { expect, it } from 'vitest';
import { joinHalves, otherHalf } from './comtrade-halves.js';

const cfg = 'Plant,R1,1999\n1,1A,0D\n1,U,A,,V,1,0,0,-9,9,1,1,S\n50\n1\n1000,2\n,\n,\nASCII\n1\n';
const dat = '1,0,5\n2,1000,7\n';
const at = (path: string, text: string, lastModified = 7) => ({
  file: new File([text], path.split('/').at(-1) ?? '', { lastModified }),
  path,
});

it('makes a single file of a pair as IEC 60255-24 lays it out, each half byte for byte', async () => {
  const other = at('u.csv', 'x');
  const { files, used } = await joinHalves(
    [at('a/Plant.CFG', cfg), other, at('b/plant.dat', 'elsewhere'), at('a/plant.dat', dat, 9)],
    [],
  );
  expect(files.map(({ path }) => path)).toEqual(['u.csv', 'b/plant.dat', 'a/Plant.cff']);
  expect(used).toEqual([]);
  const joined = files[2];
  expect(joined).toMatchObject({
    madeOf: ['Plant.CFG', 'plant.dat'],
    file: { name: 'Plant.cff', lastModified: 9 },
  });
  // Each section begins with a line of its kind (IEC 60255-24:2013, clause on the single file with .cff).
  expect(await joined?.file.text()).toMatch(
    /^--- file type: CFG ---\r?\nPlant,R1[\s\S]*ASCII\n1\n\r?\n--- file type: DAT ASCII ---\r?\n1,0,5\n2,1000,7\n$/,
  );
});

it('joins a half with one that came before, and says why two files are no pair', async () => {
  const held = { ...at('plant.dat', dat), id: 3 };
  const { files, used } = await joinHalves([at('plant.cfg', cfg)], [held]);
  expect(files.map(({ path }) => path)).toEqual(['plant.cff']);
  expect(used).toEqual([held]);
  const apart = await joinHalves([at('app.cfg', 'colour = red\n'), at('app.dat', 'x')], []);
  expect(apart.files.map(({ path }) => path)).toEqual(['app.cfg', 'app.dat']);
  for (const { reason } of apart.files) expect(reason).toContain('app.cfg');
});

it('names the half that is missing', () => {
  expect([otherHalf('plant.cfg'), otherHalf('PLANT.DAT')]).toEqual(['plant.dat', 'PLANT.CFG']);
});
