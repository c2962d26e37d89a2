import type { PreviewSignal } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { drawSignal } from './signal-path.js';

const signal = (change: Partial<PreviewSignal>): PreviewSignal => ({
  ...{ column: 0, name: 'u', quantity: 'voltage', unit: 'V', startS: 0, stepS: 1e-4 },
  ...{ values: [-1, 1], rms: 1, peak: 1, fundamentalHz: null },
  ...change,
});

describe('first cycles of a channel', () => {
  it('go from the left to the right, the largest value on top', () => {
    // 6 % of the range is left free over and under: (1.12 − 0.06) / 1.12 of the height.
    expect(drawSignal(signal({}))?.path).toBe('M0.0 94.64L1000.0 5.36');
    expect(drawSignal(signal({}))?.zeroAt).toBeCloseTo(50, 9);
  });

  it('are five where the fundamental is known', () => {
    const values = Array.from({ length: 2000 }, (_, i) => Math.sin(2 * Math.PI * 50 * i * 1e-4));
    // Five cycles of 50 Hz are 100 ms: 1000 steps of 0.1 ms.
    expect(drawSignal(signal({ values, fundamentalHz: 50 }))?.count).toBe(1001);
    expect(drawSignal(signal({ values, fundamentalHz: null }))?.count).toBe(2000);
  });

  it('break where values are missing, and show a lone one', () => {
    const drawing = drawSignal(signal({ values: [0, 1, null, 2, null, 3, 4] }));
    expect(drawing?.path.match(/M/g)).toHaveLength(3);
    expect(drawing?.path).toContain('h0');
    expect(drawing?.missing).toBe(2);
  });

  it('stand in the middle where they are constant, and are none where nothing is there', () => {
    expect(drawSignal(signal({ values: [5, 5] }))?.path).toBe('M0.0 50.00L1000.0 50.00');
    expect(drawSignal(signal({ values: [null] }))).toBeNull();
    expect(drawSignal(signal({ values: [0] }))?.path).toBe('M0.0 50.00h0');
  });
});
