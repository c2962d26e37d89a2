import { describe, expect, it } from 'vitest';
import {
  analyseRecord,
  centredSubgroups,
  findFundamental,
  frequencyTrack,
  harmonicGroups,
  harmonicSubgroups,
  interharmonicGroups,
  smooth,
  synchronousWindows,
  thdF,
  windowBoundaries,
} from '../src/index.js';
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
  const cycles = Number(reference.analysis.cycles_per_window);
  const nominalFrequencyHz = cycles === 10 ? 50 : 60;
  const f0 = findFundamental(samples, sampleRateHz, { nominalFrequencyHz })!.frequencyHz;
  const track = frequencyTrack(samples, sampleRateHz, f0);
  const boundaries = windowBoundaries(samples.length, sampleRateHz, f0, cycles, track);
  const { lineRms } = synchronousWindows(samples, boundaries, cycles, MAX_ORDER);
  const lines = lineRms.map((y) => Array.from({ length: MAX_ORDER }, (_, i) => y[cycles * (i + 1)]!));
  const groups = lineRms.map((y) => harmonicGroups(y, cycles, MAX_ORDER) as number[]);
  const subgroups = lineRms.map((y) => harmonicSubgroups(y, cycles, MAX_ORDER) as number[]);
  const between = lineRms.map((y) => interharmonicGroups(y, cycles, MAX_ORDER));
  const centred = lineRms.map((y) => centredSubgroups(y, cycles, MAX_ORDER));
  const smoothedSubgroups = transpose(subgroups).map((series) => smooth(series));

  const channel = analyseRecord({
    sampleRateHz,
    channels: [{ index: 0, name: 'u', quantity: 'voltage', unit, samples }],
    settings: { profile: 'mains', nominalFrequencyHz, maxOrder: MAX_ORDER },
  }).channels[0]!;

  return {
    f0_hz: channel.fundamental?.frequencyHz,
    windows: channel.windows?.count,
    ...firstAndLast('Yh', lines),
    ...firstAndLast('Yg', groups),
    ...firstAndLast('Ysg', subgroups),
    ...firstAndLast('Yig', between),
    ...firstAndLast('Yisg', centred),
    thd_h: lines.map((y) => thdF(y, MAX_ORDER)),
    thdg: groups.map((y) => thdF(y, MAX_ORDER)),
    thds: subgroups.map((y) => thdF(y, MAX_ORDER)),
    pwhd_h: lines.map(weightedDistortion),
    pwhd_g: groups.map(weightedDistortion),
    Yg_smoothed_avg: channel.harmonics.map((h) => h.smoothedMeanRms),
    Yg_smoothed_max: channel.harmonics.map((h) => h.smoothedMaxRms),
    Ysg_smoothed_avg: smoothedSubgroups.map((series) => series.reduce((a, b) => a + b, 0) / series.length),
    Ysg_smoothed_max: smoothedSubgroups.map((series) => Math.max(...series)),
    ...singleOrders(groups),
  };
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

/** PWHD over orders 14..40, IEC 61000-3-12. */
function weightedDistortion(values: number[]): number {
  let sum = 0;
  for (let h = 14; h <= MAX_ORDER; h++) sum += h * (values[h - 1]! / values[0]!) ** 2;
  return Math.sqrt(sum);
}

function transpose(rows: number[][]): number[][] {
  return rows[0]!.map((_, i) => rows.map((row) => row[i]!));
}
