import { describe, expect, it } from 'vitest';
import { toTarget, toTargetValues } from './target-values.js';

const view = { fromS: 1.25, toS: 1.33 };

describe('what a note speaks of', () => {
  it('comes back from its fields as it went in', () => {
    const targets = [
      { kind: 'order', order: 15 },
      { kind: 'line', frequencyHz: 175.5 },
      { kind: 'span', fromS: 0.5, toS: 0.75 },
    ] as const;
    for (const target of targets) expect(toTarget(toTargetValues(target, view))).toEqual(target);
  });

  it('offers the part in view as a span', () => {
    expect(toTarget({ ...toTargetValues(null, view), kind: 'span' })).toEqual({ kind: 'span', ...view });
  });

  it('takes a decimal comma', () => {
    const values = { ...toTargetValues(null, view), kind: 'line', frequencyHz: '175,5' } as const;
    expect(toTarget(values)).toEqual({ kind: 'line', frequencyHz: 175.5 });
  });

  it('says what is missing or turned around', () => {
    expect(toTarget(toTargetValues(null, view))).toEqual({ problem: 'Choose an order' });
    const turned = { ...toTargetValues(null, view), kind: 'span', fromS: '2', toS: '1' } as const;
    expect(toTarget(turned)).toEqual({ problem: 'The span must end after it begins' });
    expect(toTarget({ ...turned, kind: 'line', frequencyHz: '' })).toHaveProperty('problem');
  });
});
