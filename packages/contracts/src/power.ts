import { z } from 'zod';
import { maxChannelIndex } from './common.js';

const figure = z.number().nullable();
const channelIndex = z.number().int().min(0).max(maxChannelIndex);

/** Active and reactive power of one order. */
export const powerOrderSchema = z.object({
  order: z.number().int(),
  voltageRms: z.number(),
  currentRms: z.number(),
  phaseDifferenceDeg: figure.describe('Voltage minus current, positive when the current lags'),
  voltagePhaseZeroCrossingDeg: figure.describe('Sine form, zero time = rising zero crossing of the voltage'),
  currentPhaseZeroCrossingDeg: figure,
  P: figure.describe('W, positive into the load'),
  Q: figure.describe('var, positive when the current lags'),
  direction: z.enum(['into-load', 'from-load']).nullable(),
});

/** Factors for transformers and their derating (IEEE C57.110, UL 1561, EN 50541). */
export const transformerFactorsSchema = z.object({
  maxOrder: z.number().int().describe('Highest order that counts'),
  kFactorMeasured: figure,
  kFactorRated: figure.describe('By the rated current of the settings; null without it'),
  fhl: figure.describe('Harmonic loss factor F_HL'),
  fhlStr: figure.describe('Harmonic loss factor for other stray losses'),
  factorKEn: figure.describe('Derating factor K, e = 0.1, q = 1.7'),
});

/** The quantities of IEEE 1459 under their symbols, in V, A, W, var and VA; ratios are plain numbers. */
const powerFigures = {
  V: figure,
  I: figure,
  V1: figure,
  I1: figure,
  VH: figure,
  IH: figure,
  P: figure,
  P1: figure,
  PH: figure,
  Q1: figure,
  S: figure,
  S1: figure,
  N: figure,
  DI: figure,
  DV: figure,
  SH: figure,
  DH: figure,
  SN: figure,
  PF: figure,
  PF1: figure,
  harmonicPollution: figure.describe('SN/S1'),
  thdV: figure.describe('VH/V1, DC included'),
  thdI: figure.describe('IH/I1, DC included'),
};

/** A voltage with its current: the quantities of IEEE 1459 under their symbols, in V, A, W, var and VA. */
export const powerPairSchema = z.object({
  voltageChannel: channelIndex,
  currentChannel: channelIndex,
  phase: z.number().int().nullable(),
  frequencyHz: z.number(),
  ...powerFigures,
  orders: z.array(powerOrderSchema),
  transformer: transformerFactorsSchema,
});
export type PowerPair = z.infer<typeof powerPairSchema>;

const phasor = z.object({ rms: z.number(), phaseDeg: figure });

/** Symmetrical components of one order (Fortescue). */
export const sequenceOrderSchema = z.object({
  order: z.number().int(),
  zero: phasor,
  positive: phasor,
  negative: phasor,
});

const three = z.tuple([channelIndex, channelIndex, channelIndex]);
const unbalance = z.object({
  u2: figure.describe('Negative over positive sequence of order 1'),
  u0: figure.describe('Zero over positive sequence of order 1'),
});

/** Three phases together (IEEE 1459, effective quantities). */
export const threePhaseSchema = z.object({
  voltageChannels: three,
  currentChannels: three,
  wires: z.enum(['3w', '4w']),
  frequencyHz: z.number(),
  phases: z.array(z.object(powerFigures)).length(3),
  P: figure,
  Ve: figure,
  Ie: figure,
  Ve1: figure,
  Ie1: figure,
  Se: figure,
  Se1: figure,
  SeN: figure,
  SU1: figure,
  PFe: figure,
  P1plus: figure,
  Q1plus: figure,
  S1plus: figure,
  Sarithmetic: figure,
  lineToLineRms: z.array(z.number()).describe('1–2, 2–3, 3–1'),
  neutralRms: figure.describe('rms of the sum of the currents'),
  neutralOrders: z.array(z.object({ order: z.number().int(), rms: z.number(), phaseDeg: figure })),
  voltageSequences: z.array(sequenceOrderSchema),
  currentSequences: z.array(sequenceOrderSchema),
  voltageUnbalance: unbalance,
  currentUnbalance: unbalance,
});
export type ThreePhase = z.infer<typeof threePhaseSchema>;

/** Which channels belong together; guessed from names and quantities when absent. */
export const pairsSettingSchema = z
  .array(
    z.object({
      voltage: channelIndex,
      current: channelIndex,
      phase: z.union([z.literal(1), z.literal(2), z.literal(3)]).optional(),
    }),
  )
  .max(64);
export const threePhaseSettingSchema = z
  .array(z.object({ voltages: three, currents: three, wires: z.enum(['3w', '4w']) }))
  .max(16);
