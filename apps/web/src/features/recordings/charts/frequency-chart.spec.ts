import type { Note, Spectrum } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { light } from '../../../lib/theme/palette.js';
import {
  frequencyChart,
  nearestLine,
  orderRange,
  rangeOfRelayout,
  strongestNear,
  wholeRange,
  type FrequencyChartInput,
} from './frequency-chart.js';
import { letterOf, withLetters } from './note-letters.js';
import type { OrderRow } from './order-rows.js';

const spectrum: Spectrum = {
  channel: 0,
  unit: 'V',
  window: 'hann',
  resolutionHz: 5,
  ...{ noiseBandwidthHz: 7.5, segments: 1, scaling: 'spectrum' as const },
  frequencyHz: [0, 50, 75, 100, 1000],
  rms: [0, 230, 0.5, 2.3, 0.1],
};
const row = (order: number, rms: number) =>
  ({ order, rms, frequencyHz: 50 * order, result: null }) as unknown as OrderRow;

const input = (over: Partial<FrequencyChartInput> = {}): FrequencyChartInput => ({
  spectrum,
  rows: [row(1, 230), row(2, 2.3)],
  scale: 'log',
  relative: false,
  lines: [],
  families: [],
  marks: 'orders',
  range: { fromHz: 0, toHz: 150 },
  notes: [],
  selectedHz: null,
  heightPx: 260,
  ...over,
});

describe('spectrum by frequency', () => {
  it('ends one order after the last, or at its own end where there are no orders', () => {
    const { rows } = input();
    expect(orderRange(spectrum, rows)).toEqual({ fromHz: 0, toHz: 150 });
    expect(orderRange(spectrum, [])).toEqual(wholeRange(spectrum));
    expect(wholeRange(spectrum)).toEqual({ fromHz: 0, toHz: 1000 });
  });

  it('shows the range it is given, with amplitudes to suit the lines in it', () => {
    const { layout } = frequencyChart(input({ range: { fromHz: 60, toHz: 110 }, scale: 'linear' }), light);
    expect(layout.xaxis?.range).toEqual([60, 110]);
    expect(layout.yaxis?.range).toEqual([0, expect.closeTo(2.3 * 1.12, 9)]);
  });

  it('hears of a range dragged in the chart, in the unit of its axis', () => {
    expect(rangeOfRelayout({ 'xaxis.range[0]': 1.5, 'xaxis.range[1]': 12 }, 1e-3)).toEqual({
      fromHz: 1500,
      toHz: 12_000,
    });
    expect(rangeOfRelayout({ 'xaxis.autorange': true }, 1)).toBe('whole');
    expect(rangeOfRelayout({ autosize: true }, 1)).toBeNull();
  });

  it('marks the largest lines by the harmonic series they belong to', () => {
    const families = [{ fundamentalHz: 50, orders: [1, 2], shareOfPower: 0.99 }];
    const lines = [
      { frequencyHz: 50, rms: 230, familyIndex: 0, order: 1 },
      { frequencyHz: 75, rms: 0.5, familyIndex: null, order: null },
    ];
    const marked = frequencyChart(input({ marks: 'lines', lines, families }), light).traces.at(-1);
    expect(marked).toMatchObject({ x: [50, 75], marker: { symbol: ['circle', 'x-thin'] } });
    const words = (marked?.customdata as string[]).map((text) => text.split('<br>').at(-1));
    expect(words).toEqual(['order 1 of the series of 50.00\u00a0Hz', 'in no harmonic series']);
  });

  it('marks nothing on a density and names its unit', () => {
    const density = { ...spectrum, scaling: 'density' as const };
    const { traces } = frequencyChart(input({ spectrum: density }), light);
    expect(traces).toHaveLength(1);
    expect(traces[0]?.hovertemplate).toContain(' V/√Hz<extra>');
  });

  it('is told in percent of the fundamental on request', () => {
    const [line] = frequencyChart(input({ relative: true, scale: 'linear' }), light).traces;
    expect((line?.y as number[])[3]).toBeCloseTo(1, 12);
  });

  it('keeps the unit of the channel where no fundamental gives the reference', () => {
    const { traces } = frequencyChart(input({ rows: [], relative: true, scale: 'linear' }), light);
    expect(traces[0]?.y).toEqual([null, 230, 0.5, 2.3, 0.1]);
    expect(traces[0]?.hovertemplate).toContain(' V<extra>');
  });

  it('puts letters on lines and orders, not on time spans', () => {
    const target = (note: Note['target']) => ({ target: note }) as Note;
    const notes = withLetters([
      target({ kind: 'line', frequencyHz: 75 }),
      target({ kind: 'span', fromS: 0, toS: 1 }),
      target({ kind: 'order', order: 2 }),
    ]);
    const letters = frequencyChart(input({ notes }), light).traces.at(-1);
    expect(letters).toMatchObject({ x: [75, 100], text: ['<b>a</b>', '<b>c</b>'] });
  });

  it('finds the line meant by a pointer beside it', () => {
    expect(nearestLine(spectrum, 90)).toBe(3);
    expect(strongestNear(spectrum, 90, 20)).toBe(3);
    expect(strongestNear(spectrum, 70, 25)).toBe(1);
  });
});

describe('letters of notes', () => {
  it('go on after z', () => {
    expect([0, 25, 26, 27, 52].map(letterOf)).toEqual(['a', 'z', 'aa', 'ab', 'ba']);
  });
});
