import { describe, expect, it } from 'vitest';
import { AnalysisInputError } from '../errors.js';
import { resolveSettings } from '../profiles/resolve-settings.js';
import { createWindowGrid, windowCount } from './window-grid.js';

const SETTINGS = resolveSettings({ profile: 'mains', nominalFrequencyHz: 50 }, []);

function grid(seconds: number, sampleRateHz: number, channelCount = 1) {
  return createWindowGrid(0, 50, null, {
    ...{ sampleRateHz, channelCount, settings: SETTINGS, ordersFromWindows: true },
    sampleCount: seconds * sampleRateHz,
  });
}

describe('window grid', () => {
  // IEC 61000-4-7, 4.4.1: 10 cycles of 50 Hz; 600 s hold 3000 windows of 200 ms.
  it('lays windows of 200 ms over ten minutes', () => {
    const { boundaries, orders, bandCentresHz, cycles } = grid(600, 50_000);
    expect(boundaries).toHaveLength(3001);
    expect(boundaries[3000]).toBe(30_000_000);
    expect({ orders, cycles, bands: bandCentresHz.length }).toEqual({ orders: 50, cycles: 10, bands: 35 });
  });

  it('takes ten hours of one channel and refuses a day of six, naming the span', () => {
    expect(windowCount(grid(36_000, 10_000))).toBe(180_000);
    expect(() => grid(86_400, 10_000, 6)).toThrow(AnalysisInputError);
    expect(() => grid(86_400, 10_000, 6)).toThrow(
      'The span of 86400 s holds 432000 windows of 10 cycles, too many for 50 orders of 6 channels.',
    );
  });
});
