import type { ChannelSummary, Recording } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { channelOf, mixedUnits, ordersShown, valueAt, type OverlaySeries } from './series.js';

const summary = (changes: Partial<ChannelSummary> = {}): ChannelSummary => ({
  channel: 0,
  name: 'i',
  quantity: 'current',
  unit: 'A',
  fundamentalHz: 50,
  rms: 5,
  thdFPercent: 30,
  harmonicRms: [4, 0, 1],
  ...changes,
});
const series = (changes: Partial<ChannelSummary> = {}): OverlaySeries => ({
  key: 'key',
  style: 0,
  recordingId: 'recording',
  analysisId: 'analysis',
  label: 'R-0001',
  name: 'Dimmer',
  summary: summary(changes),
});

describe('amplitudes of an overlay', () => {
  it('are the rms, or percent of the channel’s own fundamental: 1 A of 4 A is 25 %', () => {
    expect(valueAt(summary(), 3, 'absolute')).toBe(1);
    expect(valueAt(summary(), 3, 'relative')).toBeCloseTo(25, 12);
    expect(valueAt(summary(), 1, 'relative')).toBeCloseTo(100, 12);
  });

  it('are absent beyond the last order and without a fundamental, never zero', () => {
    expect(valueAt(summary(), 4, 'absolute')).toBeNull();
    expect(valueAt(summary({ harmonicRms: [0, 0, 1] }), 3, 'relative')).toBeNull();
    expect(valueAt(summary({ harmonicRms: [] }), 1, 'absolute')).toBeNull();
  });

  it('run over as many orders as the longest channel has', () => {
    const both = [series(), series({ harmonicRms: [1, 1, 1, 1, 1, 1] })];
    expect(ordersShown(both, 'all')).toEqual([1, 2, 3, 4, 5, 6]);
    expect(ordersShown(both, 'odd')).toEqual([1, 3, 5]);
    expect(ordersShown([], 'odd')).toEqual([]);
  });

  it('do not mix units on one axis, in words', () => {
    const mixed = [series(), series({ unit: 'V', quantity: 'voltage' })];
    expect(mixedUnits(mixed, 'absolute')).toBe('Amperes and volts can’t share an axis; switch to relative');
    expect(mixedUnits(mixed, 'relative')).toBeNull();
    expect(mixedUnits([series(), series()], 'absolute')).toBeNull();
  });
});

it('an entry without a channel stands for the first current', () => {
  const recording = {
    summaries: [summary({ name: 'u', quantity: 'voltage', unit: 'V' }), summary({ channel: 1 })],
  } satisfies Pick<Recording, 'summaries'>;
  const entry = { recordingId: 'recording', style: 0 };
  expect(channelOf({ ...entry, channel: null }, recording)?.channel).toBe(1);
  expect(channelOf({ ...entry, channel: 0 }, recording)?.name).toBe('u');
  expect(channelOf({ ...entry, channel: 7 }, recording)).toBeNull();
});
