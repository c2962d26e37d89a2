import { describe, expect, it } from 'vitest';
import { describeColumns, quantityFromName } from './header-cell.js';

const one = (cell: string) => describeColumns([cell], null, 1)[0];

// Common practice of instruments and measuring software; no standard fixes the header of a table.
describe('header cells', () => {
  it.each([
    ['U [V]', 'U', 'V', 'voltage'],
    ['VA_G1 [kV]', 'VA_G1', 'kV', 'voltage'],
    ['time (ms)', 'time', 'ms', 'other'],
    ['u_V', 'u', 'V', 'voltage'],
    ['i1_A', 'i1', 'A', 'current'],
    ['Voltage, V', 'Voltage', 'V', 'voltage'],
    ['Strom / mA', 'Strom', 'mA', 'current'],
    ['accel_g', 'accel', 'g', 'acceleration'],
    ['Current', 'Current', '', 'current'],
    ['IN_TF7', 'IN_TF7', '', 'current'],
    ['index', 'index', '', 'other'],
    ['uptime', 'uptime', '', 'other'],
    ['phase_A', 'phase_A', '', 'other'],
    ['U_A', 'U_A', '', 'voltage'],
  ])('reads %s', (cell, name, unit, quantity) => {
    expect(one(cell)).toEqual({ index: 0, name, unit, quantity });
  });

  it('takes A, B, C for phases where they stand side by side', () => {
    const columns = describeColumns(['I_A', 'I_B', 'I_C'], null, 3);
    expect(columns.map(({ name, unit }) => [name, unit])).toEqual([
      ['I_A', ''],
      ['I_B', ''],
      ['I_C', ''],
    ]);
  });

  it('prefers the units row, brackets or not', () => {
    const columns = describeColumns(['t', 'a', 'b'], ['s', '(kV)', '[A]'], 3);
    expect(columns.map(({ unit }) => unit)).toEqual(['s', 'kV', 'A']);
  });

  it('names columns without a header and keeps names apart', () => {
    expect(describeColumns([], null, 2).map(({ name }) => name)).toEqual(['column 1', 'column 2']);
    const names = describeColumns(['u_V', 'u_mV', 'x', 'x'], null, 4).map(({ name }) => name);
    expect(new Set(names).size).toBe(4);
  });

  it('tells quantities from names', () => {
    expect(quantityFromName('uL1')).toBe('voltage');
    expect(quantityFromName('Spannung L1')).toBe('voltage');
    expect(quantityFromName('valve')).toBeNull();
  });
});
