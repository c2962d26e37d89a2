import { describe, expect, it } from 'vitest';
import {
  analyseRecord,
  AnalysisStopped,
  analyseSource,
  computePart,
  wrapDegrees,
  type AnalyseSourceOptions,
  type AnalysisPart,
  type AnalysisSettings,
  type ChannelInput,
  type ProfileName,
  type RecordSource,
} from '../src/index.js';
import { seededNoise } from './seeded-noise.js';

const RATE = 10_000;
/** Longer than 2^20 samples, so that the windows give the orders. */
const LONG = 1_200_000;

interface Order {
  order: number;
  rms: number;
  phaseDeg: number;
}

function wave(
  frequencyHz: number,
  orders: readonly Order[],
  length: number,
  noise = 0,
  seed = 1,
): Float64Array {
  const random = noise > 0 ? seededNoise(length, seed) : null;
  return Float64Array.from({ length }, (_, n) => {
    const turns = (frequencyHz * n) / RATE;
    return orders.reduce(
      (sum, { order, rms, phaseDeg }) =>
        sum + Math.SQRT2 * rms * Math.cos(2 * Math.PI * order * turns + (phaseDeg * Math.PI) / 180),
      (random?.[n] ?? 0) * noise,
    );
  });
}

const VOLTAGE: Order[] = [
  { order: 1, rms: 230, phaseDeg: 20 },
  { order: 5, rms: 6, phaseDeg: -100 },
];
const CURRENT: Order[] = [
  { order: 1, rms: 8, phaseDeg: -16.869898 },
  { order: 3, rms: 2, phaseDeg: 75 },
  { order: 5, rms: 1, phaseDeg: 20 },
];

function channels(length: number, frequencyHz = 49.983, noise = 0): ChannelInput[] {
  return [
    {
      index: 4,
      name: 'i',
      quantity: 'current',
      unit: 'A',
      samples: wave(frequencyHz, CURRENT, length, noise, 2),
    },
    {
      index: 7,
      name: 'u',
      quantity: 'voltage',
      unit: 'V',
      samples: wave(frequencyHz, VOLTAGE, length, noise, 3),
    },
  ];
}

const LONG_NOISY = channels(LONG, 49.983, 0.05);

function inBlocks(
  inputs: readonly ChannelInput[],
  settings: AnalysisSettings,
): { source: RecordSource; runPart: AnalyseSourceOptions['runPart'] } {
  const samples = new Map(inputs.map((channel) => [channel.index, channel.samples]));
  const read = (channel: number, from: number, to: number) =>
    Promise.resolve(samples.get(channel)!.slice(from, to));
  return {
    source: {
      sampleRateHz: RATE,
      sampleCount: inputs[0]!.samples.length,
      channels: inputs.map(({ samples: _, ...channel }) => channel),
      settings,
    },
    // Through the structured clone both ways, as between threads.
    runPart: async (part, onProgress) =>
      structuredClone(await computePart(structuredClone(part), read, { onProgress })),
  };
}

describe('analyseSource', () => {
  it.each<[ProfileName, number]>([
    ['mains', 30_011],
    ['general', 30_011],
    ['tone', 30_011],
    ['mains', LONG],
    ['general', LONG],
    ['tone', LONG],
  ])('gives the figures of analyseRecord in the %s profile for %i samples', async (profile, length) => {
    const inputs = length === LONG ? LONG_NOISY : channels(length, 49.983, 0.05);
    const settings: AnalysisSettings = { profile, nominalFrequencyHz: 50, maxOrder: 9 };
    const { source, runPart } = inBlocks(inputs, settings);
    const result = await analyseSource(source, { runPart, parallel: 3 });
    expect(result).toEqual(analyseRecord({ sampleRateHz: RATE, channels: inputs, settings }));
  });

  it('finds frequency, orders and phases of a long record and the power of a pair', async () => {
    const { source, runPart } = inBlocks(channels(LONG), {
      profile: 'mains',
      nominalFrequencyHz: 50,
      maxOrder: 15,
    });
    const { channels: results, power } = await analyseSource(source, { runPart });
    const current = results[0]!;
    expect(current.fundamental!.frequencyHz).toBeCloseTo(49.983, 9);
    expect(current.windows).toMatchObject({ count: 599, cycles: 10, gridChannel: 7, flaggedCount: 0 });
    expect(current.windows!.synchronisationErrorPercent).toBeLessThan(1e-3);
    for (const { order, rms, phaseDeg } of CURRENT) {
      const found = current.harmonics[order - 1]!;
      expect(found.rms).toBeCloseTo(rms, 9);
      expect(Math.abs(wrapDegrees(found.phaseDeg! - phaseDeg))).toBeLessThan(1e-5);
      expect(found.subgroupStatistics!.p99).toBeCloseTo(rms, 6);
    }
    // V1 I1 cos 36.87° + V5 I5 cos 120° = 230·8·0.8 − 6·1·0.5, IEEE 1459.
    expect(power).toHaveLength(1);
    expect(power[0]).toMatchObject({ voltageChannel: 7, currentChannel: 4 });
    expect(power[0]!.P).toBeCloseTo(230 * 8 * 0.8 + 6 * Math.cos((120 * Math.PI) / 180), 4);
    expect(power[0]!.Q1).toBeCloseTo(230 * 8 * 0.6, 4);
  });

  // Six standard deviations of the Cramér-Rao bound of one tone, fs/(2π)·√(24 σ²/(A² N (N² − 1))), for order 1 alone.
  it('finds the frequency of a long noisy record near the Cramér-Rao bound', () => {
    const noise = 20;
    const samples = wave(50.021, VOLTAGE, LONG, noise, 5);
    const [channel] = analyseRecord({
      sampleRateHz: RATE,
      channels: [{ index: 0, name: 'u', quantity: 'voltage', unit: 'V', samples }],
      settings: { profile: 'mains', nominalFrequencyHz: 50, maxOrder: 9 },
    }).channels;
    const bound = (RATE / (2 * Math.PI)) * Math.sqrt((24 * noise ** 2) / (2 * 230 ** 2 * LONG ** 3));
    expect(Math.abs(channel!.fundamental!.frequencyHz - 50.021)).toBeLessThan(6 * bound);
    expect(channel!.fundamental!.frequencyUncertaintyHz! / bound).toBeCloseTo(1, 1);
  });

  it('keeps the phases of orders against one another while the frequency of a long record wanders', () => {
    // 50 Hz ± 0.05 Hz with a period of 60 s: within 0.2 Hz, so phases are given.
    const phase = (n: number) =>
      2 * Math.PI * ((50 * n) / RATE + 0.477 * Math.sin((2 * Math.PI * n) / (60 * RATE)));
    const samples = Float64Array.from({ length: LONG }, (_, n) => {
      const angle = phase(n);
      return Math.SQRT2 * (100 * Math.cos(angle) + 5 * Math.cos(13 * angle + 1));
    });
    const [channel] = analyseRecord({
      sampleRateHz: RATE,
      channels: [{ index: 0, name: 'u', quantity: 'voltage', unit: 'V', samples }],
      settings: { profile: 'mains', nominalFrequencyHz: 50, maxOrder: 15 },
    }).channels;
    const [first, thirteenth] = [channel!.harmonics[0]!, channel!.harmonics[12]!];
    expect(thirteenth.rms).toBeCloseTo(5, 3);
    // 1 rad against order 1, in sine form at its rising zero crossing: φ − 13·φ1 − 12·90°.
    expect(Math.abs(wrapDegrees(thirteenth.phaseDeg! - 13 * first.phaseDeg! - 180 / Math.PI))).toBeLessThan(
      0.1,
    );
    const { frequencyHz, startS } = channel!.series!;
    const at = (t: number) => 50 + 0.05 * Math.cos((2 * Math.PI * t) / 60);
    startS.forEach((t, j) => expect(Math.abs(frequencyHz[j]! - at(t + 0.1))).toBeLessThan(0.002));
    expect(channel!.windows!.synchronisationErrorPercent).toBeLessThan(0.03);
  });

  it('flags the windows that hold a step and leaves them out of the statistics', () => {
    const samples = wave(50, VOLTAGE, 40_000).map((x, n) => (n >= 20_900 && n < 20_905 ? x + 400 : x));
    const [channel] = analyseRecord({
      sampleRateHz: RATE,
      channels: [{ index: 0, name: 'u', quantity: 'voltage', unit: 'V', samples }],
      settings: { profile: 'mains', nominalFrequencyHz: 50, maxOrder: 9 },
    }).channels;
    expect(Array.from(channel!.series!.flagged).indexOf(1)).toBe(10);
    expect(channel!.windows!.flaggedCount).toBe(1);
    expect(channel!.harmonics[2]!.groupStatistics!.max).toBeLessThan(1e-4);
    expect(channel!.harmonics[2]!.smoothedMaxRms).toBeGreaterThan(0.01);
  });

  it('flags the windows before and behind which a reader saw time missing', () => {
    const [channel] = analyseRecord({
      sampleRateHz: RATE,
      channels: [{ index: 0, name: 'u', quantity: 'voltage', unit: 'V', samples: wave(50, VOLTAGE, 20_000) }],
      gapsBefore: [4000, 9123],
      settings: { profile: 'mains', nominalFrequencyHz: 50, maxOrder: 9 },
    }).channels;
    expect(Array.from(channel!.series!.flagged)).toEqual([0, 1, 1, 0, 1, 0, 0, 0, 0, 0]);
  });

  it('stops between parts, passes errors on and reports progress up to 1', async () => {
    const settings: AnalysisSettings = { profile: 'mains', nominalFrequencyHz: 50 };
    const { source, runPart } = inBlocks(channels(20_000), settings);
    const seen: number[] = [];
    await analyseSource(source, { runPart, onProgress: (fraction) => seen.push(fraction) });
    expect(seen.at(-1)).toBe(1);
    expect(seen).toEqual([...seen].sort((a, b) => a - b));
    const kinds: AnalysisPart['kind'][] = [];
    const stopped = analyseSource(source, {
      runPart: (part, onProgress) => {
        kinds.push(part.kind);
        return runPart(part, onProgress);
      },
      shouldStop: () => kinds.length === 3,
    });
    await expect(stopped).rejects.toThrow(AnalysisStopped);
    expect(kinds).toHaveLength(3);
    const failing = analyseSource(source, {
      runPart: () => Promise.reject(new Error('no samples')),
      parallel: 2,
    });
    await expect(failing).rejects.toThrow('no samples');
  });

  it('names the sample that is no number, wherever its block lies', async () => {
    const inputs = channels(600_000);
    inputs[1]!.samples[500_123] = NaN;
    const { source, runPart } = inBlocks(inputs, { profile: 'mains', nominalFrequencyHz: 50 });
    await expect(analyseSource(source, { runPart })).rejects.toThrow(
      "Channel 'u' has no number at sample 500123 (50.0123 s)",
    );
  });
});
