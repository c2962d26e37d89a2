import type { ChannelAnalysis } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { figureRows } from './figure-rows.js';

const figures = (thdMaxOrder: number, highest: number) => {
  const harmonics = Array.from({ length: highest }, (_, index) => ({ order: index + 1 }));
  const channel = {
    ...{ unit: 'V', quantity: 'voltage', fundamental: null, windows: null, harmonics, thdMaxOrder },
    ...{ thdFPercent: 0.0051, thdRPercent: 5.1, thdPlusNPercent: 6.2 },
  } as unknown as ChannelAnalysis;
  return new Map(figureRows(channel).map((row) => [row.name, row]));
};

describe('figures of distortion', () => {
  it('name the orders that were counted: those of THD, as far as the record holds them', () => {
    expect(figures(40, 50).get('THD, of the fundamental')?.basis).toBe('THD_F, orders 2 to 40');
    expect(figures(40, 12).get('THD, of the rms')?.basis).toBe('THD_R, orders 2 to 12');
  });

  it('keep their digits where they are small, and say what THD+N refers to', () => {
    expect(figures(40, 50).get('THD, of the fundamental')?.shown).toBe('0.00510\u00a0%');
    expect(figures(40, 50).get('THD+N')?.basis).toContain('of the total AC rms');
  });
});
