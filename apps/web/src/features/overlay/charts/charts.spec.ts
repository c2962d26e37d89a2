import type { ChannelSummary } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { channelStyles } from '../../../lib/theme/channel-styles.js';
import { dark, light } from '../../../lib/theme/palette.js';
import { readView } from '../overlay-link.js';
import type { OverlaySeries } from '../series.js';
import { orderLines } from './order-lines.js';
import { spectrumLines } from './spectrum-lines.js';

const view = readView(new URLSearchParams('orders=odd'));
const summary: ChannelSummary = {
  channel: 0,
  name: 'i',
  quantity: 'current',
  unit: 'A',
  fundamentalHz: 50,
  rms: 4.2,
  thdFPercent: 25,
  harmonicRms: [4, 0.2, 1, 0, 0],
};
const series = (style: number): OverlaySeries => ({
  key: String(style),
  style,
  recordingId: '',
  analysisId: '',
  label: `R-000${style}`,
  name: 'Dimmer',
  summary,
});

describe('lines by order', () => {
  it('carry hue, dash and marker of their style in either theme', () => {
    const [line] = orderLines([series(1)], view, [], light).traces;
    const style = channelStyles[1]!;
    expect(line).toMatchObject({
      line: { color: style.light, dash: style.dash },
      marker: { symbol: style.symbol },
    });
    expect(orderLines([series(1)], view, [], dark).traces[0]).toMatchObject({ line: { color: style.dark } });
  });

  it('leave out zeros, which a logarithmic axis cannot show', () => {
    expect(orderLines([series(0)], view, [], light).traces[0]).toMatchObject({
      x: [1, 3, 5],
      y: [4, 1, null],
    });
  });

  it('stand under the ceiling, which is drawn first', () => {
    const { traces } = orderLines([series(0)], view, [{ order: 3, limit: 2.3 }], light);
    expect(traces).toHaveLength(3);
    expect(traces[0]).toHaveProperty('fillpattern');
  });
});

it('spectra end after the last order and have their markers at the orders', () => {
  const spectrum = {
    channel: 0,
    unit: 'A',
    window: 'rectangular' as const,
    resolutionHz: 50,
    ...{ noiseBandwidthHz: 7.5, segments: 1, scaling: 'spectrum' as const },
    frequencyHz: [0, 50, 100, 150, 10_000],
    rms: [0, 4, 0.2, 1, 0.001],
  };
  const { traces, layout } = spectrumLines(
    [{ series: series(0), spectrum }],
    { ...view, amplitude: 'relative' },
    light,
  );
  expect(layout.xaxis).toMatchObject({ range: [0, 300] });
  // 0.2 A of 4 A is 5 %, 1 A is 25 %.
  expect(traces[0]).toMatchObject({ y: [null, 100, 5, 25, 0.025] });
  expect(traces[1]).toMatchObject({ x: [50, 150, 250], y: [100, 25, null] });
});
