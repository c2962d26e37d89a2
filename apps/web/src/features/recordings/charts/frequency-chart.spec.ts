import type { Note, Spectrum } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { light } from '../../../lib/theme/palette.js';
import { frequencyChart, nearestLine, strongestNear, type FrequencyChartInput } from './frequency-chart.js';
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
  whole: false,
  notes: [],
  selectedHz: null,
  heightPx: 260,
  ...over,
});

describe('spectrum by frequency', () => {
  it('ends one order after the last, or at half the sample rate on request', () => {
    expect(frequencyChart(input(), light).layout.xaxis?.range).toEqual([0, 150]);
    expect(frequencyChart(input({ whole: true }), light).layout.xaxis?.range).toEqual([0, 1000]);
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
