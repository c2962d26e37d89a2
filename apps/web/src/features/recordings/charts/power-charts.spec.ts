import { describe, expect, it } from 'vitest';
import { light } from '../../../lib/theme/palette.js';
import { samplePair, sampleThreePhase } from '../../../testing/sample-analyses.js';
import { orderPowerChart } from './order-power-chart.js';
import { sequenceChart } from './sequence-chart.js';

describe('active power by order', () => {
  const texts = (layout: Record<string, unknown>) =>
    (layout.annotations as { text: string }[]).map(({ text }) => text);

  it('is scaled to the orders from 2, with order 1 broken and its value beside it', () => {
    const { layout } = orderPowerChart(samplePair().orders, 2, light);
    expect(layout.yaxis?.range).toEqual([expect.closeTo(-12 * 1.15, 9), expect.closeTo(0.25 * 14, 9)]);
    expect(layout.shapes).toHaveLength(3);
    expect(texts(layout)).toContain('2.010\u00a0kW');
  });

  it('names both directions in words, and hatches what comes from the load', () => {
    const { traces, layout } = orderPowerChart(samplePair().orders, 2, light);
    expect(texts(layout)).toEqual(expect.arrayContaining(['into the load ↑', 'from the load ↓']));
    expect(traces[0]?.marker).toMatchObject({ pattern: { shape: ['', '', '/'] } });
    expect((traces[0]?.customdata as string[])[2]).toContain('from the load');
  });

  it('breaks a generator’s order 1 at the lower end', () => {
    const orders = samplePair().orders.map((order) => ({ ...order, P: -(order.P ?? 0) }));
    const { layout } = orderPowerChart(orders, 2, light);
    expect(layout.annotations).toContainEqual(expect.objectContaining({ y: 0, text: '\u22122.010\u00a0kW' }));
  });

  it('stands with order 1 alone', () => {
    const { layout } = orderPowerChart(samplePair().orders.slice(0, 1), 2, light);
    expect((layout.yaxis?.range as number[])[1]).toBeCloseTo(2010 * 1.15, 6);
    expect(layout.shapes).toEqual([]);
  });
});

it('symmetrical components have a mark of their own each, and leave zeros open', () => {
  const { traces } = sequenceChart(sampleThreePhase().currentSequences, 'A', 2, light);
  expect(traces.map(({ name }) => name)).toEqual(['positive', 'negative', 'zero']);
  expect(new Set(traces.map(({ marker }) => (marker as { symbol: string }).symbol)).size).toBe(3);
  expect(traces.at(-1)?.y).toEqual([0.1, null]);
});
