import { describe, expect, it } from 'vitest';
import { resolveSettings } from './resolve-settings.js';

describe('resolved settings', () => {
  // 200 ms hold 10 cycles at 50 Hz (IEC 61000-4-7, 4.4.1), so 2000 at 10 kHz and 200 000 at 1 MHz.
  it.each([
    [50, 10],
    [10_000, 2000],
    [1e6, 200_000],
  ])('can be given again, at %s Hz too', (nominalFrequencyHz, cycles) => {
    const first = resolveSettings({ profile: 'tone', nominalFrequencyHz }, []);
    expect(first.cyclesPerWindow).toBe(cycles);
    expect(resolveSettings({ ...first, cyclesPerWindow: cycles }, [])).toEqual(first);
  });
});
