import { channelAnalysisSchema } from '@overtally/contracts';
import { expect, it } from 'vitest';
import { completed, type EarlierChannel } from './completed-channel.js';

/** As an analysis of engine 0.1.0 was frozen into a report. */
const earlier: EarlierChannel = {
  ...{ index: 2, name: 'i', quantity: 'current', unit: 'A' },
  ...{ mean: 0, rms: 1, peak: 2, crestFactor: 2, formFactor: 1.1 },
  fundamental: { frequencyHz: 50, rms: 1, phaseDeg: 0, frequencyUncertaintyHz: 0.001 },
  ...{ thdFPercent: 3, thdRPercent: 3, thdMaxOrder: 40, thdPlusNPercent: null },
  ...{ sinadDb: null, snrDb: null, sfdrDb: null, enobBits: null },
  harmonics: [
    {
      ...{ order: 1, frequencyHz: 50, rms: 1, percentOfFundamental: 100 },
      ...{ phaseDeg: 0, phaseZeroCrossingDeg: 0, groupRms: 1, subgroupRms: 1 },
      ...{ smoothedMeanRms: 1, smoothedMaxRms: 1 },
    },
  ],
  interharmonics: [],
  windows: { cycles: 10, count: 5, samplesPerWindow: 2000 },
  flags: [{ code: 'dc-heavy', severity: 'warning', message: 'DC' }],
};

it('makes of an earlier channel one of today, with nothing invented', () => {
  const channel = completed(earlier);
  expect(channelAnalysisSchema.parse(channel)).toEqual(channel);
  expect(channel).toMatchObject({ tone: null, bands: [], uncertainty: {} });
  expect(channel.harmonics[0]).toMatchObject({ rms: 1, uncertainty: null, groupStatistics: null });
  expect(channel.flags[0]!.evidence).toBeNull();
  // Every channel set its own windows, none of which was kept out.
  expect(channel.windows).toEqual({
    ...{ cycles: 10, count: 5, samplesPerWindow: 2000 },
    ...{ flaggedCount: 0, synchronisationErrorPercent: null, gridChannel: 2 },
  });
});

it('leaves a channel of today as it is', () => {
  const today = completed(earlier);
  const evidence = { count: 1, timesS: [0.5], value: 0.6, limit: 0.5, unit: null };
  const channel = { ...today, flags: [{ ...today.flags[0]!, evidence }] };
  expect(completed(channel)).toEqual(channel);
});
