import type { ChannelAnalysis, LimitSet, Note } from '@overtally/contracts';
import { findPublishedLimitSet } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { sampleHarmonic } from '../../../testing/sample-analyses.js';
import { light } from '../../../lib/theme/palette.js';
import { withLetters } from './note-letters.js';
import { orderChart, type OrderChartInput } from './order-chart.js';
import { compareChannel } from './order-rows.js';

const harmonic = (order: number, rms: number) => sampleHarmonic(order, rms, { phaseDeg: null });

/** Order 3 under and order 15 over class A: IEC 61000-3-2, table 1, 2.30 A and 0.15 A. */
const channel = {
  index: 0,
  name: 'i',
  quantity: 'current',
  unit: 'A',
  rms: 2.4,
  fundamental: { frequencyHz: 50, rms: 2, phaseDeg: null, frequencyUncertaintyHz: null },
  harmonics: [harmonic(1, 2), harmonic(2, 0), harmonic(3, 1.19), harmonic(15, 0.17)],
  windows: { cycles: 10, count: 150, samplesPerWindow: 10_000 },
} as unknown as ChannelAnalysis;

const classA = findPublishedLimitSet('iec61000-3-2.classA') as LimitSet;
const note = (target: Note['target']) => ({ target, text: 't', channel: 0 }) as unknown as Note;

const input = (over: Partial<OrderChartInput> = {}): OrderChartInput => ({
  rows: compareChannel(channel, classA).rows,
  unit: 'A',
  scale: 'log',
  relative: false,
  notes: [],
  selected: null,
  labelStep: 2,
  heightPx: 238,
  ...over,
});

const barsOf = (chart: ReturnType<typeof orderChart>) => chart.traces.find((trace) => trace.type === 'bar');

describe('a channel beside a limit set', () => {
  it('takes limits and results of its orders from the set and leaves the fundamental out', () => {
    const { rows, words, tone } = compareChannel(channel, classA);
    expect(rows.map(({ order, limit, result }) => [order, limit, result])).toEqual([
      [1, null, null],
      [2, 1.08, expect.any(String)],
      [3, 2.3, 'pass'],
      [15, 0.15, 'fail'],
    ]);
    expect([words, tone]).toEqual(['over at 15', 'over']);
  });

  it('says in words what a set needs', () => {
    const classD = findPublishedLimitSet('iec61000-3-2.classD') as LimitSet;
    const { words, rows } = compareChannel(channel, classD);
    expect(words).toBe('needs the active power');
    expect(rows.every(({ limit }) => limit === null)).toBe(true);
  });

  it('stands alone without a set', () => {
    expect(compareChannel(channel, null)).toMatchObject({ words: 'not compared', gap: null });
  });
});

describe('bars by order', () => {
  it('leave a value of zero open, since a logarithmic axis has no place for it, and mark it at the foot', () => {
    const chart = orderChart(input(), light);
    expect(barsOf(chart)).toMatchObject({ x: [1, 2, 3, 15], y: [2, null, 1.19, 0.17] });
    const marks = chart.traces.find(({ marker }) =>
      JSON.stringify(marker ?? {}).includes('triangle-down-open'),
    );
    expect(marks?.x).toEqual([2]);
    expect(chart.belowAxis).toBe(1);
  });

  it('reach down to weak orders, six decades at most', () => {
    const weak = Array.from({ length: 18 }, (_, i) => harmonic(i + 21, i === 0 ? 1e-9 : 1e-4));
    const { rows } = compareChannel({ ...channel, harmonics: [...channel.harmonics, ...weak] }, classA);
    const chart = orderChart(input({ rows }), light);
    expect(chart.layout.yaxis?.range).toMatchObject([
      expect.closeTo(Math.log10(1e-4 / 3), 9),
      expect.anything(),
    ]);
    // The zero of order 2 and the picoamperes of order 21.
    expect(chart.belowAxis).toBe(2);
  });

  it('are scaled to the orders from 2 on a linear axis, with order 1 broken and its value beside it', () => {
    const { rows } = compareChannel(channel, null);
    const { layout } = orderChart(input({ rows, scale: 'linear' }), light);
    expect(layout.yaxis?.range).toEqual([0, expect.closeTo(1.19 * 1.12, 9)]);
    expect(layout.annotations).toMatchObject([{ text: '2.000\u00a0A' }]);
    // Class A limits order 3 to 2.3 A, which leaves room for the 2 A of order 1.
    expect(orderChart(input({ scale: 'linear' }), light).layout.annotations).toEqual([]);
  });

  it('tell the fundamental, orders disregarded, within and over apart', () => {
    expect(barsOf(orderChart(input(), light))?.marker).toMatchObject({
      color: [light.ruleStrong, light.inkSoft, light.ink, light.over],
    });
  });

  it('turn with their limits into percent of the fundamental', () => {
    const { traces } = orderChart(input({ relative: true }), light);
    expect(traces.find((trace) => trace.type === 'bar')?.y).toEqual([100, null, 59.5, 8.5]);
    const ceiling = traces.find((trace) => trace.type === 'scatter' && trace.fill === undefined);
    expect(ceiling?.y).toContainEqual(expect.closeTo(115, 9));
  });

  it('label odd orders, and fewer where there is less room', () => {
    const ticks = (labelStep: number) => orderChart(input({ labelStep }), light).layout.xaxis?.tickvals;
    expect(ticks(2)).toEqual([1, 3, 5, 7, 9, 11, 13, 15]);
    expect(ticks(5)).toEqual([1, 5, 10, 15]);
  });

  it('carry the letters of their notes, one over the other on the same order', () => {
    const notes = withLetters([
      note({ kind: 'order', order: 15 }),
      note({ kind: 'span', fromS: 0, toS: 1 }),
      note({ kind: 'order', order: 15 }),
      note({ kind: 'order', order: 99 }),
    ]);
    const letters = orderChart(input({ notes }), light).traces.at(-1);
    expect(letters).toMatchObject({ x: [15, 15], text: ['<b>a</b>', '<b>c</b>'] });
    const [first = 0, second = 0] = letters?.y as number[];
    expect(first).toBeGreaterThan(0.17);
    expect(second).toBeGreaterThan(first);
  });
});
