import {
  analysisSchema,
  channelAnalysisSchema,
  type Analysis,
  type ChannelAnalysis,
  type Harmonic,
} from '@overtally/contracts';
import { sampleId } from './samples.js';

const moment = '2026-11-26T13:20:00Z';

/** One order of a sample channel; its groups hold nothing but the line. */
export const sampleHarmonic = (order: number, rms: number, change: Partial<Harmonic> = {}): Harmonic => ({
  ...{ order, frequencyHz: 50 * order, rms, percentOfFundamental: 50 * rms, phaseDeg: 0 },
  ...{ phaseZeroCrossingDeg: 0, groupRms: rms, subgroupRms: rms, smoothedMeanRms: rms, smoothedMaxRms: rms },
  ...{ uncertainty: null, groupStatistics: null, subgroupStatistics: null },
  ...change,
});

/** A current of 2 A with 2.4 A in order 3: above 2.3 A, where the sample set limits it. */
export const sampleChannel = (change: Partial<ChannelAnalysis> = {}): ChannelAnalysis =>
  channelAnalysisSchema.parse({
    ...{ index: 0, name: 'i', quantity: 'current', unit: 'A', mean: 0, rms: 3.2, peak: 6 },
    ...{ crestFactor: 2, formFactor: 1.5, thdFPercent: 120, thdRPercent: 77, thdMaxOrder: 40 },
    fundamental: { frequencyHz: 50, rms: 2, phaseDeg: 0, frequencyUncertaintyHz: 0.001 },
    ...{ thdPlusNPercent: null, sinadDb: null, snrDb: null, sfdrDb: null, enobBits: null },
    harmonics: [sampleHarmonic(1, 2), sampleHarmonic(3, 2.4)],
    interharmonics: [],
    windows: {
      ...{ cycles: 10, count: 9, samplesPerWindow: 2000, flaggedCount: 0, gridChannel: 0 },
      synchronisationErrorPercent: 0.01,
    },
    ...{ tone: null, distortion: null, bands: [], countedFrequency: [], lines: [], families: [] },
    uncertainty: {},
    flags: [],
    ...change,
  });

/** A finished analysis of recording 147 with one channel of current. */
export const sampleAnalysis = (change: Partial<Analysis> = {}): Analysis =>
  analysisSchema.parse({
    ...{ id: sampleId(500), recordingId: sampleId(147), projectId: sampleId(10), status: 'done' },
    ...{ progress: 1, problem: null, engineVersion: '0.1.0', supersededById: null },
    settings: { profile: 'mains', nominalFrequencyHz: 50 },
    channels: [sampleChannel()],
    ...{ power: [], threePhase: [], startedBy: { id: sampleId(1), name: 'Mara Lind' } },
    ...{ createdAt: moment, finishedAt: moment },
    ...change,
  });
