import type { ChannelSummary } from '@overtally/contracts';
import { findPublishedLimitSet } from '@overtally/limits';
import { describe, expect, it } from 'vitest';
import { compareRecording } from './comparison.js';

const classA = findPublishedLimitSet('iec61000-3-2.classA') ?? null;

function current(channel: number, thirdOrderA: number): ChannelSummary {
  return {
    channel,
    name: `I${channel}`,
    quantity: 'current',
    unit: 'A',
    fundamentalHz: 50,
    rms: 5,
    thdFPercent: 10,
    harmonicRms: [5, 0.01, thirdOrderA, ...Array.from({ length: 37 }, () => 0.001)],
  };
}

// IEC 61000-3-2, Table 1: order 3 of class A is limited to 2.30 A.
describe('comparison of a recording with a limit set', () => {
  it('speaks for the channel that comes nearest to its limit', () => {
    const comparison = compareRecording({ summaries: [current(0, 1.15), current(1, 2.53)] }, classA);
    expect(comparison.channel?.name).toBe('I1');
    expect(comparison.compared).toBe(2);
    expect(comparison.shares.find((share) => share.order === 3)?.sharePercent).toBeCloseTo(110, 6);
    expect(comparison).toMatchObject({ words: 'over at 3', tone: 'over' });
  });

  it('says within exactly at the limit', () => {
    expect(compareRecording({ summaries: [current(0, 2.3)] }, classA)).toMatchObject({
      words: 'within',
      tone: 'within',
    });
  });

  it('calls nothing within that was not measured', () => {
    // 1 kHz of sample rate reaches order 9 of 50 Hz; class A limits orders to 40.
    const short = { ...current(0, 1), harmonicRms: [5, 0, 1, 0, 0, 0, 0, 0, 0] };
    expect(compareRecording({ summaries: [short] }, classA)).toMatchObject({
      words: 'within to order 9, the rest not measured',
      tone: 'inkSoft',
    });
  });

  it('says what is missing instead of comparing', () => {
    const voltage: ChannelSummary = { ...current(0, 1), quantity: 'voltage', unit: 'V' };
    expect(compareRecording({ summaries: [voltage] }, classA).words).toBe('no current channel');
    expect(compareRecording({ summaries: [voltage] }, null).words).toBe('not compared');
    expect(compareRecording({ summaries: [] }, classA).channel).toBeNull();
  });
});
