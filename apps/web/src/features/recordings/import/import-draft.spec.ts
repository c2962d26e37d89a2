import type { ImportPreview } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { untouchedColumn } from './column-draft.js';
import { columnKey, draftOf, faultsOf, fieldsOf, hasFaults, optionsOf } from './import-draft.js';

const column = (index: number, name: string) => ({ index, name, unit: 'V', quantity: 'voltage' as const });
const preview = {
  columns: [column(0, 't'), column(1, 'u'), column(2, 'i')],
  rows: [[0, 1.5, 2.5]],
  timeColumn: 0,
  clockColumns: [0],
} as unknown as ImportPreview;
/** A counter in ms beside the time in s, and a column of words. */
const withClock = {
  ...preview,
  columns: [...preview.columns, column(3, 'ms'), column(4, 'state')],
  rows: [[0, 1.5, 2.5, 0, 'run']],
  clockColumns: [0, 3],
} as unknown as ImportPreview;

const touched = (key: string, change: Partial<typeof untouchedColumn>) => ({
  ...draftOf({}),
  columns: { [key]: { ...untouchedColumn, ...change } },
});

describe('import form', () => {
  it('asks for nothing while nothing is set', () => {
    expect(optionsOf(draftOf({}), preview)).toEqual({});
  });

  it('keeps what a file was read with', () => {
    const options = {
      sampleRateHz: 12500,
      decimal: ',' as const,
      timeColumn: null,
      missingValues: 'interpolate' as const,
      unevenTime: 'refuse' as const,
      channels: [
        { column: 0, name: 'u', gain: 100 },
        { column: 1, unit: 'A', probeRatio: 10, inverted: true },
        { column: 2, offset: -0.5 },
      ],
    };
    expect(optionsOf(draftOf(options), preview)).toEqual(options);
  });

  it('leaves out the columns that a file was read without', () => {
    const options = { channels: [{ column: 2 }] };
    expect(optionsOf(draftOf(options), preview)).toEqual(options);
  });

  it('finds columns that options name, and the time column among them', () => {
    const draft = draftOf({ timeColumn: 'T', channels: [{ column: 'I [V]', gain: 3 }] });
    expect(fieldsOf(draft, column(2, 'i'), preview).gain).toBe('3');
    expect(optionsOf(draft, preview)).toEqual({ timeColumn: 't', channels: [{ column: 2, gain: 3 }] });
  });

  it('names every kept value column once one of them is touched, never the time column', () => {
    const draft = touched(columnKey(2), { gain: '0,1' });
    expect(optionsOf(draft, preview).channels).toEqual([{ column: 1 }, { column: 2, gain: 0.1 }]);
    const without = touched(columnKey(1), { keep: false });
    expect(optionsOf(without, preview).channels).toEqual([{ column: 2 }]);
  });

  it('brings no second clock and no column of words among the channels, unless they are chosen', () => {
    const draft = touched(columnKey(1), { gain: '2' });
    expect(optionsOf(draft, withClock).channels).toEqual([{ column: 1, gain: 2 }, { column: 2 }]);
    const chosen = touched(columnKey(3), {});
    expect(optionsOf(chosen, withClock).channels).toEqual([{ column: 1 }, { column: 2 }, { column: 3 }]);
  });

  it('reads numbers with point or comma and refuses words', () => {
    expect(optionsOf({ ...draftOf({}), sampleRateHz: '1,5e3' }, null)).toEqual({ sampleRateHz: 1500 });
    expect(faultsOf({ ...draftOf({}), sampleRateHz: 'ten' })).toHaveProperty('sampleRateHz');
    expect(faultsOf({ ...draftOf({}), sampleRateHz: '0' })).toHaveProperty('sampleRateHz');
    expect(faultsOf({ ...draftOf({}), headerRows: '1.5' })).toHaveProperty('headerRows');
    expect(faultsOf(touched('#1', { gain: 'x' })).columns).toHaveProperty('#1.gain');
    expect(hasFaults(faultsOf(touched('#1', { gain: 'x', keep: false })))).toBe(false);
    expect(hasFaults(faultsOf({ ...draftOf({}), sampleRateHz: '50000' }))).toBe(false);
  });
});
