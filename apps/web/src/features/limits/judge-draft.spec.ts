import { findPublishedLimitSet } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { askedParameters, readParameters, setsForChannel } from './judge-draft.js';

const setOf = (id: string) => {
  const set = findPublishedLimitSet(id);
  if (!set) throw new Error(`No set ${id}`);
  return set;
};

describe('parameters of a verdict', () => {
  it('are those of the set, and the uncertainty for the rules that guard with it (ILAC-G8:09/2019, 4.2.2)', () => {
    // IEC 61000-3-2, Table 3 limits class D in mA per W of active power.
    const needed = (id: string, rule: 'simple-acceptance' | 'guarded-acceptance') =>
      askedParameters(setOf(id), rule).needed;
    expect(needed('iec61000-3-2.classD', 'simple-acceptance')).toEqual(['powerW']);
    expect(needed('iec61000-3-2.classD', 'guarded-acceptance')).toEqual([
      'powerW',
      'expandedUncertaintyPercent',
    ]);
    // IEC 61000-3-12 chooses its row by Rsce and refers to Iref; IEEE 519 chooses by Isc/IL and refers to IL.
    expect(needed('iec61000-3-12.table3', 'simple-acceptance')).toEqual(['rsce', 'irefA']);
    expect(needed('ieee519-2022.table2', 'simple-acceptance')).toEqual(['iscOverIl', 'ilA']);
  });

  it('that only decide whether limits apply may be left out, as the power of class A', () => {
    expect(askedParameters(setOf('iec61000-3-2.classA'), 'simple-acceptance')).toEqual({
      needed: [],
      optional: ['powerW'],
    });
    const read = readParameters({ needed: [], optional: ['powerW'] }, { powerW: '' });
    expect(read).toEqual({ parameters: {}, problems: {}, missing: [] });
    expect(readParameters({ needed: [], optional: ['powerW'] }, { powerW: '60' }).parameters).toEqual({
      powerW: 60,
    });
  });

  it('leave the uncertainty open where the orders of the channel carry their own', () => {
    const channel = { harmonics: [{ uncertainty: 0.01 }] } as Parameters<typeof askedParameters>[2];
    expect(askedParameters(setOf('iec61000-3-2.classD'), 'non-binary', channel)).toEqual({
      needed: ['powerW'],
      optional: ['expandedUncertaintyPercent'],
    });
  });

  it('are read with point or comma; what is empty is missing and never zero', () => {
    const read = readParameters(
      { needed: ['powerW', 'powerFactor', 'ilA'], optional: [] },
      { powerW: ' 180,5 ', powerFactor: '' },
    );
    expect(read).toEqual({ parameters: { powerW: 180.5 }, problems: {}, missing: ['powerFactor', 'ilA'] });
  });

  it('say what is wrong at their own field', () => {
    const { problems, parameters } = readParameters(
      { needed: ['powerW', 'powerFactor', 'ilA'], optional: [] },
      {
        powerW: '-4',
        powerFactor: '95',
        ilA: 'ten',
      },
    );
    expect(parameters).toEqual({});
    expect(problems.powerW).toContain('above zero');
    expect(problems.powerFactor).toContain('0 and 1');
    expect(problems.ilA).toContain('number');
  });
});

it('sets of the channel’s quantity stand first', () => {
  const sets = [setOf('en50160.lv'), setOf('iec61000-3-2.classA')];
  const { fitting, others } = setsForChannel(sets, { quantity: 'current' });
  expect(fitting.map(({ id }) => id)).toEqual(['iec61000-3-2.classA']);
  expect(others.map(({ id }) => id)).toEqual(['en50160.lv']);
});
