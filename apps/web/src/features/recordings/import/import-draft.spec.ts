import type { ImportPreview } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { draftOf, faultsOf, optionsOf, parseNumber, untouchedColumn } from './import-draft.js';

const column = (index: number, name: string) => ({ index, name, unit: 'V', quantity: 'voltage' as const });
const preview = {
  columns: [column(0, 't'), column(1, 'u'), column(2, 'i')],
  timeColumn: 0,
} as ImportPreview;

describe('import form', () => {
  it('asks for nothing while nothing is set', () => {
    expect(optionsOf(draftOf({}), preview)).toEqual({});
  });

  it('keeps what a file was read with', () => {
    const options = {
      sampleRateHz: 12500,
      decimal: ',' as const,
      timeColumn: null,
      channels: [
        { column: 0, name: 'u', gain: 100 },
        { column: 1, unit: 'A' },
        { column: 2, offset: -0.5 },
      ],
    };
    expect(optionsOf(draftOf(options), preview)).toEqual(options);
  });

  it('names every kept value column once one of them is touched, never the time column', () => {
    const draft = { ...draftOf({}), columns: { 2: { ...untouchedColumn, gain: '0,1' } } };
    expect(optionsOf(draft, preview).channels).toEqual([{ column: 1 }, { column: 2, gain: 0.1 }]);
    const without = { ...draftOf({}), columns: { 1: { ...untouchedColumn, keep: false } } };
    expect(optionsOf(without, preview).channels).toEqual([{ column: 2 }]);
  });

  it('reads numbers with point or comma and refuses words', () => {
    expect(parseNumber('1,5e3')).toBe(1500);
    expect(parseNumber('ten')).toBeNull();
    expect(faultsOf({ ...draftOf({}), sampleRateHz: '0' })).toHaveProperty('sampleRateHz');
    expect(faultsOf({ ...draftOf({}), headerRows: '1.5' })).toHaveProperty('headerRows');
    expect(faultsOf({ ...draftOf({}), columns: { 1: { ...untouchedColumn, gain: 'x' } } })).toHaveProperty(
      'columns',
    );
    expect(faultsOf({ ...draftOf({}), sampleRateHz: '50000' })).toEqual({});
  });
});
