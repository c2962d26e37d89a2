import { describe, expect, it } from 'vitest';
import { analyseRecord, smooth, weightedDistortion, type WindowSeries } from '../src/index.js';
import { judge } from './judge.js';
import { readRecord, referenceCases, type ReferenceCase } from './reference-cases.js';

const MAX_ORDER = 40;

describe.each(referenceCases(4))('$id $title', (reference) => {
  const results = measure(reference);

  it.each(Object.keys(reference.expected))('%s', (quantity) => {
    expect(judge(reference.expected[quantity]!, results[quantity])).toBeNull();
  });
});

function measure(reference: ReferenceCase): Record<string, unknown> {
  const { samples, sampleRateHz, unit } = readRecord(reference);
  const nominalFrequencyHz = Number(reference.analysis.cycles_per_window) === 10 ? 50 : 60;
  const channel = analyseRecord({
    sampleRateHz,
    channels: [{ index: 0, name: 'u', quantity: 'voltage', unit, samples }],
    settings: { profile: 'mains', nominalFrequencyHz, maxOrder: MAX_ORDER },
  }).channels[0]!;
  const series = channel.series!;
  const groups = byWindow(series, 'group', MAX_ORDER);
  const smoothedSubgroups = transpose(byWindow(series, 'subgroup', MAX_ORDER)).map((row) => smooth(row));

  return {
    f0_hz: channel.fundamental?.frequencyHz,
    windows: channel.windows?.count,
    ...firstAndLast('Yh', byWindow(series, 'line', MAX_ORDER)),
    ...firstAndLast('Yg', groups),
    ...firstAndLast('Ysg', byWindow(series, 'subgroup', MAX_ORDER)),
    ...firstAndLast('Yig', byWindow(series, 'interharmonicGroup', MAX_ORDER + 1)),
    ...firstAndLast('Yisg', byWindow(series, 'centredSubgroup', MAX_ORDER + 1)),
    thd_h: ratios(series.thd),
    thdg: ratios(series.thdg),
    thds: ratios(series.thds),
    pwhd_h: ratios(series.pwhd),
    pwhd_g: groups.map(weightedDistortion),
    Yg_smoothed_avg: channel.harmonics.map((h) => h.smoothedMeanRms),
    Yg_smoothed_max: channel.harmonics.map((h) => h.smoothedMaxRms),
    Ysg_smoothed_avg: smoothedSubgroups.map((row) => row.reduce((a, b) => a + b, 0) / row.length),
    Ysg_smoothed_max: smoothedSubgroups.map((row) => Math.max(...row)),
    ...singleOrders(groups),
  };
}

type Rows = 'line' | 'group' | 'subgroup' | 'interharmonicGroup' | 'centredSubgroup';

/** One list of orders for each window. */
function byWindow(series: WindowSeries, figure: Rows, rows: number): number[][] {
  const { count } = series;
  return Array.from({ length: count }, (_, j) =>
    Array.from({ length: rows }, (_, i) => series[figure][i * count + j]!),
  );
}

function ratios(percent: Float64Array): number[] {
  return Array.from(percent, (value) => value / 100);
}

function firstAndLast(name: string, perWindow: unknown[]): Record<string, unknown> {
  return { [`${name}_first`]: perWindow[0], [`${name}_last`]: perWindow.at(-1) };
}

function singleOrders(groups: number[][]): Record<string, unknown> {
  const out: Record<string, unknown> = {};
  transpose(groups).forEach((series, i) => {
    out[`Yg_h${i + 1}`] = series;
    out[`Yg_smoothed_h${i + 1}`] = Array.from(smooth(series));
  });
  return out;
}

function transpose(rows: number[][]): number[][] {
  return rows[0]!.map((_, i) => rows.map((row) => row[i]!));
}
