import type { Note, Waveform } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { light } from '../../../lib/theme/palette.js';
import { withLetters } from './note-letters.js';
import { spanOfRelayout, waveformChart, waveformPoints, type WaveformChartInput } from './waveform-chart.js';

const samples: Waveform = {
  channel: 0,
  unit: 'A',
  kind: 'samples',
  fromS: 1,
  toS: 1.003,
  startS: 1,
  stepS: 0.001,
  values: [0, 2, null],
  minimum: [],
  maximum: [],
};

const input = (change: Partial<WaveformChartInput>): WaveformChartInput => ({
  waveform: samples,
  span: { fromS: 1, toS: 1.08 },
  notes: [],
  labels: 9,
  markS: null,
  ...change,
});

describe('waveform against time', () => {
  it('keeps samples where they were taken and leaves missing ones open', () => {
    const { x, y } = waveformPoints(samples, 1000);
    expect(x).toEqual([1000, 1001, 1002].map((ms) => expect.closeTo(ms, 9)));
    expect(y).toEqual([0, 2, null]);
  });

  it('draws each bin of an envelope as one stroke from minimum to maximum', () => {
    const envelope: Waveform = {
      ...samples,
      kind: 'envelope',
      values: [],
      startS: 0,
      stepS: 2,
      minimum: [-1, null],
      maximum: [1, null],
    };
    expect(waveformPoints(envelope, 1)).toEqual({ x: [1, 1, 3, 3], y: [-1, 1, null, null] });
  });

  it('shows the span in the unit that suits it', () => {
    const { layout } = waveformChart(input({}), light);
    expect(layout.xaxis).toMatchObject({ range: [1000, 1080], ticksuffix: ' ms' });
  });

  it('stands for a record of missing samples alone', () => {
    const empty = { ...samples, values: [null, null] };
    expect(waveformChart(input({ waveform: empty }), light).layout.yaxis).toMatchObject({
      range: [-1, 1],
    });
  });

  it('marks time spans of notes that reach into the view', () => {
    const note = (fromS: number, toS: number) => ({ target: { kind: 'span', fromS, toS } }) as Note;
    const notes = withLetters([note(0, 0.5), note(1.04, 2)]);
    const { traces, layout } = waveformChart(input({ notes }), light);
    expect(layout.shapes).toMatchObject([
      { x0: 1040, x1: 2000 },
      { x0: 1040, x1: 1040 },
      { x0: 2000, x1: 2000 },
    ]);
    expect(traces.at(-1)).toMatchObject({ x: [expect.closeTo(1060, 9)], text: ['<b>b</b>'] });
  });

  it('reads zooming back in seconds', () => {
    const shown = { fromS: 0, toS: 0.08 };
    const zoomed = spanOfRelayout({ 'xaxis.range[0]': 10, 'xaxis.range[1]': 30 }, shown);
    expect(zoomed).toEqual({ fromS: 0.01, toS: 0.03 });
    expect(spanOfRelayout({ 'xaxis.autorange': true }, shown)).toBe('whole');
    expect(spanOfRelayout({ autosize: true }, shown)).toBeNull();
  });
});
