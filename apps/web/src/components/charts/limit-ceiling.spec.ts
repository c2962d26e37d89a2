import { describe, expect, it } from 'vitest';
import { light } from '../../lib/theme/palette.js';
import { ceilingSteps, ceilingTraces } from './limit-ceiling.js';

describe('limit ceiling', () => {
  it('steps half an order to each side and rises straight up between neighbours', () => {
    const steps = ceilingSteps([
      { order: 3, limit: 2.3 },
      { order: 2, limit: 1.08 },
    ]);
    expect(steps.x).toEqual([1.5, 2.5, 2.5, 3.5]);
    expect(steps.y).toEqual([1.08, 1.08, 2.3, 2.3]);
  });

  it('breaks where an order carries no limit, as class D has none on even orders', () => {
    const steps = ceilingSteps([
      { order: 3, limit: 2.3 },
      { order: 5, limit: 1.14 },
    ]);
    expect(steps.x).toEqual([2.5, 3.5, null, 4.5, 5.5]);
  });

  it('hatches from the line up to the top and draws nothing without limits', () => {
    const [hatching] = ceilingTraces([{ order: 2, limit: 1 }], 10, light);
    expect(hatching).toMatchObject({ x: [1.5, 1.5, 2.5, 2.5, 1.5], y: [10, 1, 1, 10, 10] });
    expect(ceilingTraces([], 10, light)).toEqual([]);
  });
});
