import type { RecordedChannel, Recording } from '@overtally/contracts';
import { hashKey } from '@tanstack/react-query';
import { describe, expect, it } from 'vitest';
import { waveformQuery } from './get-waveform.js';

const channel = (change: Partial<RecordedChannel> = {}): RecordedChannel => ({
  ...{ index: 0, name: 'u', quantity: 'voltage', unit: 'V', gain: 1, offset: 0, chain: null },
  ...change,
});
const recording = {
  ...{ id: 'r', status: 'ready', sampleRateHz: 10_000, sampleCount: 2000, latestAnalysisId: 'first' },
  channels: [channel(), channel({ index: 1 })],
} as Recording;
const key = (change: Partial<Recording> = {}) =>
  hashKey(waveformQuery({ ...recording, ...change }, { channel: 0, points: 1200 }).queryKey);

describe('waveform kept by the browser', () => {
  it('is kept while its samples stay as they are', () => {
    expect(key({ name: 'renamed' })).toBe(key());
    expect(key({ channels: [channel(), channel({ index: 1, gain: 20 })] })).toBe(key());
  });

  it.each<[string, Partial<Recording>]>([
    ['a new reading', { latestAnalysisId: 'second' }],
    ['a reading under way', { status: 'reading' }],
    ['another sample rate', { sampleRateHz: 20_000 }],
    ['another gain', { channels: [channel({ gain: 20 })] }],
    ['another offset', { channels: [channel({ offset: -1 })] }],
    ['another unit', { channels: [channel({ unit: 'A' })] }],
  ])('is asked for anew after %s', (_, change) => {
    expect(key(change)).not.toBe(key());
  });
});
