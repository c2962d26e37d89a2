import { channelAnalysisSchema, powerPairSchema, threePhaseSchema } from '@overtally/contracts';
import { analyseRecord, type AnalysisSettings, type ChannelInput } from '@overtally/dsp';
import { describe, expect, it } from 'vitest';
import type { Storage } from '../../storage/storage.js';
import { storeChannel } from './store-channel.js';

const sampleRateHz = 10_000;

/** Takes the long arrays and drops them; what is looked at are the figures. */
const nowhere = { put: () => Promise.resolve({ size: 0, sha256: '' }) } as unknown as Storage;

type Signal = (n: number) => number;
const sine: Signal = (n) => Math.sin((2 * Math.PI * 50 * n) / sampleRateHz);
/** The congruential generator of Numerical Recipes, 7.1.3, as a sawtooth hash: repeatable noise. */
const noise: Signal = (n) => ((Math.imul(n + 1, 1_664_525) + 1_013_904_223) >>> 0) / 2 ** 32 - 0.5;

const signals: Record<string, Signal> = {
  'a sine': sine,
  silence: () => 0,
  'DC alone': () => 5,
  noise,
  'a clipped sine with steps': (n) => Math.max(-0.5, Math.min(0.5, sine(n))) + (n % 700 === 0 ? 3 : 0),
  'one spike': (n) => (n === 17 ? 1 : 0),
};
const lengths = [2, 1999, 20_000];
const profiles = ['mains', 'tone', 'general'] as const;

function channelsOf(signal: Signal, length: number): ChannelInput[] {
  const samples = Float64Array.from({ length }, (_, n) => signal(n));
  const shifted = Float64Array.from({ length }, (_, n) => 0.1 * signal(n + 20));
  return [
    ...[0, 1, 2].map((i) => ({ index: i, name: `u${i + 1}`, quantity: 'voltage', unit: 'V', samples })),
    ...[3, 4, 5].map((i) => ({
      index: i,
      name: `i${i - 2}`,
      quantity: 'current',
      unit: 'A',
      samples: shifted,
    })),
  ];
}

describe('whatever is analysed fits the contract once it is stored', () => {
  it.each(Object.keys(signals))('%s', { timeout: 60_000 }, async (name) => {
    for (const length of lengths) {
      for (const profile of profiles) {
        const settings: AnalysisSettings = {
          ...{ profile, nominalFrequencyHz: 50 as const },
          threePhase: [{ voltages: [0, 1, 2], currents: [3, 4, 5], wires: '4w' }],
        };
        const record = { sampleRateHz, channels: channelsOf(signals[name]!, length), settings };
        const { channels, power, threePhase } = analyseRecord(record);
        const stored = await Promise.all(channels.map((one) => storeChannel(nowhere, 'a', one)));
        // As the database keeps it: what is no number becomes null.
        const kept = JSON.parse(JSON.stringify({ stored, power, threePhase })) as Record<string, unknown[]>;
        const fits = {
          channels: channelAnalysisSchema.array().safeParse(kept.stored),
          power: powerPairSchema.array().safeParse(kept.power),
          threePhase: threePhaseSchema.array().safeParse(kept.threePhase),
        };
        for (const [part, { error }] of Object.entries(fits)) {
          expect(error?.issues ?? [], `${part} of ${length} samples, ${profile}`).toEqual([]);
        }
      }
    }
  });
});
