import { describe, expect, it } from 'vitest';
import { importOptionsSchema, updateRecordingSchema } from './recordings.js';

// Durations are sample count / rate and figures gain x value + offset: JSON has no number for what is not finite.
describe('numbers from which every figure stays finite', () => {
  it.each([5e-324, 1e-4, 1e11])('a sample rate of %d Hz is refused', (sampleRateHz) => {
    expect(importOptionsSchema.safeParse({ sampleRateHz }).success).toBe(false);
  });

  it.each([{ gain: 1e200 }, { gain: -1e13 }, { offset: 1e308 }])('scaling by %j is refused', (scale) => {
    expect(importOptionsSchema.safeParse({ channels: [{ column: 0, ...scale }] }).success).toBe(false);
    expect(updateRecordingSchema.safeParse({ channels: [{ index: 0, ...scale }] }).success).toBe(false);
  });

  it('what benches use is taken', () => {
    const channels = [{ column: 0, gain: -2e6, offset: 1e-9 }];
    expect(importOptionsSchema.safeParse({ sampleRateHz: 5e9, channels }).success).toBe(true);
  });
});
