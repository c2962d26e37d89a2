import {
  analysisSchema,
  channelAnalysisSchema,
  powerPairSchema,
  threePhaseSchema,
  type Analysis,
  type ChannelAnalysis,
  type Harmonic,
  type PowerPair,
  type ThreePhase,
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

const powerFigures = {
  ...{
    V: 230,
    I: 10,
    V1: 230,
    I1: 9.8,
    VH: 3,
    IH: 2,
    P: 2000,
    P1: 2010,
    PH: -10,
    Q1: 800,
    S: 2300,
    S1: 2254,
  },
  ...{ N: 1136, DI: 460, DV: 29, SH: 6, DH: null, SN: 461, PF: 0.8696, PF1: 0.8917 },
  ...{ harmonicPollution: 0.2045, thdV: 0.013, thdI: 0.204 },
};

const orderPower = (order: number, P: number, direction: 'into-load' | 'from-load' | null) => ({
  ...{ order, voltageRms: 230 / order, currentRms: 9.8 / order, phaseDifferenceDeg: 20, P, Q: 1, direction },
  ...{ voltagePhaseZeroCrossingDeg: 0, currentPhaseZeroCrossingDeg: -20 },
});

/** Power of a voltage with a current: order 5 comes from the load. */
export const samplePair = (change: Partial<PowerPair> = {}): PowerPair =>
  powerPairSchema.parse({
    ...{ voltageChannel: 0, currentChannel: 1, phase: null, frequencyHz: 50 },
    ...powerFigures,
    orders: [
      orderPower(1, 2010, 'into-load'),
      orderPower(3, 2, 'into-load'),
      orderPower(5, -12, 'from-load'),
    ],
    transformer: {
      ...{ maxOrder: 50, kFactorMeasured: 6.42, kFactorRated: null, fhl: 6.42, fhlStr: 1.2 },
      factorKEn: 1.1,
    },
    ...change,
  });

const phasor = (rms: number) => ({ rms, phaseDeg: null });
const sequence = (order: number, positive: number, negative: number, zero: number) => ({
  ...{ order, positive: phasor(positive), negative: phasor(negative), zero: phasor(zero) },
});

/** Three phases of channels 0 to 5. */
export const sampleThreePhase = (change: Partial<ThreePhase> = {}): ThreePhase =>
  threePhaseSchema.parse({
    ...{ voltageChannels: [0, 1, 2], currentChannels: [3, 4, 5], wires: '4w', frequencyHz: 50 },
    phases: [powerFigures, powerFigures, powerFigures],
    ...{
      P: 6000,
      Ve: 230,
      Ie: 10,
      Ve1: 230,
      Ie1: 9.8,
      Se: 6900,
      Se1: 6762,
      SeN: 1380,
      SU1: 300,
      PFe: 0.8696,
    },
    ...{ P1plus: 6030, Q1plus: 2400, S1plus: 6750, Sarithmetic: 6900, lineToLineRms: [398, 399, 400] },
    ...{ neutralRms: 0.7, neutralOrders: [{ order: 3, rms: 0.66, phaseDeg: 10 }] },
    voltageSequences: [sequence(1, 230, 1.5, 1.2)],
    currentSequences: [sequence(1, 9.8, 0.2, 0.1), sequence(5, 0.01, 1.5, 0)],
    ...{ voltageUnbalance: { u2: 0.0065, u0: 0.0052 }, currentUnbalance: { u2: 0.02, u0: null } },
    ...change,
  });
