import type { ChannelAnalysis, Harmonic } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { basisOfChannel, measurementOfChannel } from './measurement.js';

const harmonic = (rest: Partial<Harmonic>): Harmonic => ({
  order: 3,
  frequencyHz: 150,
  rms: 1,
  percentOfFundamental: 10,
  phaseDeg: null,
  phaseZeroCrossingDeg: null,
  groupRms: null,
  subgroupRms: null,
  smoothedMeanRms: null,
  smoothedMaxRms: null,
  uncertainty: null,
  groupStatistics: null,
  subgroupStatistics: null,
  ...rest,
});
const channel = (rest: Partial<ChannelAnalysis>): ChannelAnalysis => ({
  ...{ index: 0, name: 'i', quantity: 'current', unit: 'A', mean: 0, rms: 10, peak: 14 },
  ...{ crestFactor: null, formFactor: null, thdFPercent: null, thdRPercent: null, thdMaxOrder: 40 },
  ...{ thdPlusNPercent: null, sinadDb: null, snrDb: null, sfdrDb: null, enobBits: null },
  fundamental: { frequencyHz: 50, rms: 9.9, phaseDeg: 0, frequencyUncertaintyHz: null },
  ...{ tone: null, distortion: null, bands: [], countedFrequency: [], lines: [], families: [] },
  uncertainty: {},
  harmonics: [],
  interharmonics: [],
  windows: null,
  flags: [],
  ...rest,
});
const meanOf = (quantity: 'current' | 'voltage', rest: Partial<Harmonic>) =>
  measurementOfChannel(channel({ quantity, harmonics: [harmonic(rest)] })).harmonics[0]?.mean;

const basisOf = (quantity: 'current' | 'voltage', rest: Partial<Harmonic>) =>
  basisOfChannel(channel({ quantity, harmonics: [harmonic(rest)] }));

describe('measurementOfChannel', () => {
  it('takes the smoothed mean, the group or the line for a current (IEC 61000-4-7, 5.5.1)', () => {
    const all = { groupRms: 2, subgroupRms: 3, smoothedMeanRms: 4 };
    expect(meanOf('current', all)).toBe(4);
    expect(meanOf('current', { ...all, smoothedMeanRms: null })).toBe(2);
    expect(meanOf('current', {})).toBe(1);
    const bases = [all, { ...all, smoothedMeanRms: null }, {}].map((rest) => basisOf('current', rest));
    expect(bases).toEqual(['smoothed groups', 'groups', 'single lines']);
  });

  it('takes the subgroup or the line for a voltage (IEC 61000-4-30)', () => {
    expect(meanOf('voltage', { groupRms: 2, subgroupRms: 3, smoothedMeanRms: 4 })).toBe(3);
    expect(meanOf('voltage', { groupRms: 2 })).toBe(1);
    const bases = [{ subgroupRms: 3, smoothedMeanRms: 4 }, { groupRms: 2 }].map((rest) =>
      basisOf('voltage', rest),
    );
    expect(bases).toEqual(['subgroups', 'single lines']);
  });

  it('counts orders below half the sample rate as measurable: 2000 samples in 10 cycles reach order 99', () => {
    const rest = { flaggedCount: 0, synchronisationErrorPercent: null, gridChannel: 0 };
    const windows = { cycles: 10, count: 5, samplesPerWindow: 2000, ...rest };
    expect(measurementOfChannel(channel({ windows })).highestMeasurableOrder).toBe(99);
    const odd = { cycles: 10, count: 5, samplesPerWindow: 803.2, ...rest };
    expect(measurementOfChannel(channel({ windows: odd })).highestMeasurableOrder).toBe(40);
  });

  it('without windows takes the highest order listed', () => {
    const harmonics = [harmonic({ order: 2 }), harmonic({ order: 17 })];
    expect(measurementOfChannel(channel({ harmonics })).highestMeasurableOrder).toBe(17);
  });

  it('has no fundamental where the analysis has none', () => {
    expect(measurementOfChannel(channel({ fundamental: null })).fundamentalRms).toBeNull();
  });
});
