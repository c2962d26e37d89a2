import { describe, expect, it } from 'vitest';
import { thdF } from '../figures/distortion.js';
import { thdStandard, thdSynchronisation } from './thd-uncertainty.js';

describe('uncertainty of THD', () => {
  // T = √(X_2² + X_3²)/X_1 by finite differences, JCGM 100:2008, 5.1.2 with 5.1.3, note 2.
  it('propagates the uncertainties of the orders by the partial derivatives', () => {
    const lineRms = [100, 3, 4];
    const inPhase = [0.5, 0.02, 0.03];
    const moved = lineRms.map((_, i) => {
      const up = lineRms.map((rms, k) => (k === i ? rms + 1e-3 * inPhase[i]! : rms));
      return (thdF(up, 3)! - thdF(lineRms, 3)!) / 1e-3;
    });
    const standard = thdStandard({ lineRms, inPhase, power: [0, 0, 0] });
    expect(standard / Math.hypot(...moved)).toBeCloseTo(1, 3);
  });

  // 39 orders of nothing but noise of mean square p each read T = √(39 p)/X_1, and the true value is 0.
  it('reaches down to nothing where all distortion is noise', () => {
    const power = Array.from({ length: 40 }, () => 1e-4);
    const lineRms = power.map((p, i) => (i === 0 ? 100 : Math.sqrt(p)));
    const expanded = 2 * thdStandard({ lineRms, inPhase: power.map((p) => Math.sqrt(p / 2)), power });
    expect(expanded).toBeGreaterThan(thdF(lineRms, 40)!);
    expect(expanded).toBeLessThan(2 * thdF(lineRms, 40)!);
  });

  // Windows of 10 cycles and 0.03 %, computed line by line as a sum over 4000 samples.
  it.each([
    ['high orders', { 1: 100, 35: 6, 37: 5, 40: 4 }],
    ['hardly any distortion', { 1: 100, 3: 0.01 }],
  ])('bounds what windows that miss whole cycles make of %s', (_, content: Record<number, number>) => {
    const lineRms = Array.from({ length: 40 }, (__, i) => content[i + 1] ?? 0);
    const synchronism = { cycles: 10, error: 3e-4 };
    const count = 4000;
    const reading = (phase: number) => {
      const samples = Array.from({ length: count }, (__, n) => {
        const turned = ((2 * Math.PI * 10 * n) / count) * (1 + synchronism.error) + phase;
        return Object.entries(content).reduce(
          (x, [h, rms]) => x + Math.SQRT2 * rms * Math.cos(Number(h) * turned),
          0,
        );
      });
      const lines = lineRms.map((__, i) => {
        let [re, im] = [0, 0];
        samples.forEach((x, n) => {
          const angle = (2 * Math.PI * 10 * (i + 1) * n) / count;
          re += x * Math.cos(angle);
          im += x * Math.sin(angle);
        });
        return Math.hypot(re, im);
      });
      return lines.map((x) => (Math.SQRT2 * x) / count);
    };
    const shares = [0, 0.8, 1.6, 2.4].map((phase) => {
      const read = reading(phase);
      const miss = Math.abs(thdF(read, 40)! - thdF(lineRms, 40)!);
      return miss / (2 * thdSynchronisation(read, synchronism).standard);
    });
    expect(Math.max(...shares)).toBeLessThan(1);
    expect(Math.max(...shares)).toBeGreaterThan(0.3);
  });
});
