import { describe, expect, it } from 'vitest';
import { analyseRecord, type AnalysisSettings, type ChannelInput } from '../src/index.js';
import { seededNoise } from './seeded-noise.js';

const RATE = 10_000;
const LENGTH = 40_000;

function sine(frequencyHz: number, rms: number, noise = 0, seed = 1): Float64Array {
  const random = seededNoise(LENGTH, seed);
  return Float64Array.from(
    { length: LENGTH },
    (_, n) => Math.SQRT2 * rms * Math.cos((2 * Math.PI * frequencyHz * n) / RATE) + noise * random[n]!,
  );
}

function channel(index: number, quantity: string, samples: Float64Array): ChannelInput {
  const unit = { voltage: 'V', current: 'A' }[quantity] ?? '';
  return { index, name: `c${index}`, quantity, unit, samples };
}

function analyse(channels: ChannelInput[], settings: Partial<AnalysisSettings> = {}) {
  return analyseRecord({
    sampleRateHz: RATE,
    channels,
    settings: { profile: 'mains', nominalFrequencyHz: 50, maxOrder: 20, ...settings },
  });
}

// IEC 61000-4-7, 4.4.1: the window is synchronised to the fundamental of the supply voltage.
describe('windows of a record with several channels', () => {
  it('are set by a voltage with a strong fundamental, however strong a current is', () => {
    const { channels } = analyse([
      channel(3, 'current', sine(50.01, 500)),
      channel(5, 'voltage', sine(50.01, 230, 5)),
    ]);
    expect(channels.map(({ windows }) => windows!.gridChannel)).toEqual([5, 5]);
  });

  it('are set by the channel whose frequency is known best when no voltage is sound', () => {
    const { channels } = analyse([
      channel(0, 'voltage', sine(50.01, 1, 5, 2)),
      channel(1, 'current', sine(50.01, 10, 0.5, 3)),
      channel(2, 'current', sine(50.01, 10, 0.01, 4)),
    ]);
    expect(channels.map(({ windows }) => windows!.gridChannel)).toEqual([2, 2, 2]);
  });

  it('are the same for a channel whose frequency differs by noise only', () => {
    const { channels } = analyse([
      channel(0, 'voltage', sine(50.01, 230)),
      channel(1, 'current', sine(50.01, 0.1, 0.3, 5)),
    ]);
    const [voltage, current] = [channels[0]!, channels[1]!];
    expect(current.fundamental!.frequencyHz).not.toBe(voltage.fundamental!.frequencyHz);
    expect(current.series!.startS).toEqual(voltage.series!.startS);
    expect(current.harmonics[19]!.frequencyHz).toBe(voltage.harmonics[19]!.frequencyHz);
  });

  it('are of its own for a channel with another fundamental, for which those of the record hold no whole cycles', () => {
    const { channels, power } = analyse([
      channel(0, 'voltage', sine(50, 230)),
      channel(1, 'current', sine(51, 10)),
    ]);
    const current = channels[1]!;
    expect(current.windows!.gridChannel).toBe(1);
    expect(current.harmonics[0]!.groupRms).toBeCloseTo(10, 6);
    expect(current.harmonics[1]!.groupRms).toBeLessThan(1e-6);
    // Over whole periods of the beat, sines of different frequencies have no power in common; here 4 s of 1 Hz.
    expect(Math.abs(power[0]!.P)).toBeLessThan(0.01);
    expect(power[0]!.frequencyHz).toBeCloseTo(50, 6);
  });

  it('serve a channel without a fundamental, whose distortion then has nothing to relate to', () => {
    const { channels } = analyse([
      channel(0, 'voltage', sine(50, 230)),
      channel(1, 'current', seededNoise(LENGTH, 8)),
    ]);
    const idle = channels[1]!;
    expect(idle).toMatchObject({ fundamental: null, thdFPercent: null, distortion: null });
    expect(idle.windows).toMatchObject({ gridChannel: 0, count: 20, synchronisationErrorPercent: null });
    expect(idle.harmonics).toHaveLength(20);
    expect(idle.harmonics[4]).toMatchObject({ percentOfFundamental: null, phaseDeg: null });
    // White noise of 1 on lines of 5 Hz up to 5 kHz: √(1/1000) per line, √(9 + ½ + ½) lines in a group.
    expect(idle.harmonics[4]!.groupRms! / Math.sqrt(10 / 1000)).toBeCloseTo(1, 0);
    expect(Array.from(idle.series!.thd).every(Number.isNaN)).toBe(true);
  });

  // A model of one frequency over the whole record would lose J0(0.5)² = 0.88 of the power (Abramowitz and Stegun, 9.1).
  it.each(['mains', 'general'] as const)('give the whole power of a supply that wanders (%s)', (profile) => {
    const angle = (n: number) => (2 * Math.PI * 50 * n) / RATE + 0.5 * Math.sin((2 * Math.PI * n) / LENGTH);
    const wave = (rms: number, lag: number) =>
      Float64Array.from({ length: LENGTH }, (_, n) => Math.SQRT2 * rms * Math.cos(angle(n) - lag));
    const { power } = analyse(
      [channel(0, 'voltage', wave(230, 0)), channel(1, 'current', wave(10, Math.PI / 3))],
      { profile },
    );
    // 230 V · 10 A · cos 60° and sin 60°.
    expect(power[0]!.P / 1150).toBeCloseTo(1, 4);
    expect(power[0]!.Q1 / (2300 * Math.sin(Math.PI / 3))).toBeCloseTo(1, 4);
    expect(power[0]!.orders[0]!.currentRms).toBeCloseTo(10, 3);
  });

  it('leave the tone profile to each channel, without powers', () => {
    const { channels, power } = analyse(
      [channel(0, 'voltage', sine(50, 230)), channel(1, 'current', sine(50, 10))],
      { profile: 'tone' },
    );
    expect(power).toEqual([]);
    expect(channels.map(({ windows }) => windows)).toEqual([null, null]);
  });

  it('need channels of one length with an index each', () => {
    const short = channel(1, 'current', sine(50, 1).subarray(0, 100));
    expect(() => analyse([channel(0, 'voltage', sine(50, 1)), short])).toThrow(
      'all channels of a record must be of the same length',
    );
    const same = [channel(0, 'voltage', sine(50, 1)), channel(0, 'current', sine(50, 1))];
    expect(() => analyse(same)).toThrow('Two channels have the index 0');
  });
});
