import { findPublishedLimitSet } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { neededParameters, readParameters, setsForChannel } from './judge-draft.js';

const setOf = (id: string) => {
  const set = findPublishedLimitSet(id);
  if (!set) throw new Error(`No set ${id}`);
  return set;
};

describe('parameters of a verdict', () => {
  it('are those of the set, and the uncertainty for the rules that guard with it (ILAC-G8:09/2019, 4.2.2)', () => {
    // IEC 61000-3-2, Table 3 limits class D in mA per W of active power.
    const classD = setOf('iec61000-3-2.classD');
    expect(neededParameters(classD, 'simple-acceptance')).toEqual(['powerW']);
    expect(neededParameters(classD, 'guarded-acceptance')).toEqual(['powerW', 'expandedUncertaintyPercent']);
    expect(neededParameters(setOf('en50160.lv'), 'simple-acceptance')).toEqual([]);
  });

  it('are read with point or comma; what is empty is missing and never zero', () => {
    const read = readParameters(['powerW', 'powerFactor', 'ilA'], { powerW: ' 180,5 ', powerFactor: '' });
    expect(read).toEqual({ parameters: { powerW: 180.5 }, problems: {}, missing: ['powerFactor', 'ilA'] });
  });

  it('say what is wrong at their own field', () => {
    const { problems, parameters } = readParameters(['powerW', 'powerFactor', 'ilA'], {
      powerW: '-4',
      powerFactor: '95',
      ilA: 'ten',
    });
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
