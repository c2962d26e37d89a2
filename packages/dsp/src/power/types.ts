/**
 * DC, orders and total rms of one channel, at a fundamental that all channels of a record share. Index 0 of the lists is
 * order 1; both lists have the same length.
 */
export interface PhasorSet {
  dc: number;
  /** rms of everything in the channel, DC, interharmonics and noise included. */
  totalRms: number;
  rms: ArrayLike<number>;
  /** Cosine form, one zero time for all channels of the record. */
  phaseDeg: ArrayLike<number>;
  /** Standard deviation that noise gives the rms of one order; absent where it is not known. */
  noiseRms?: number;
}

/**
 * Power quantities of one voltage and one current under the symbols of IEEE 1459-2010, 3.1.2, in V, A, W, var and VA. The
 * ratios PF, PF1, harmonicPollution, thdV and thdI are plain numbers (0.05 = 5 %). Null where a figure does not apply:
 * a ratio to zero, or the root of a difference that is negative beyond rounding.
 */
export interface PowerFigures {
  /** Total rms, DC included. */
  V: number;
  I: number;
  V1: number;
  I1: number;
  /** √(V² − V1²): everything but order 1, DC included. */
  VH: number | null;
  IH: number | null;
  /** Active power, positive into the load. */
  P: number;
  P1: number;
  PH: number;
  /** Positive when the current lags. */
  Q1: number;
  S: number;
  S1: number;
  N: number | null;
  DI: number | null;
  DV: number | null;
  SH: number | null;
  DH: number | null;
  SN: number | null;
  /** P/S, with the sign of P. */
  PF: number | null;
  /** P1/S1, the displacement factor, with the sign of P1. */
  PF1: number | null;
  /** SN/S1. */
  harmonicPollution: number | null;
  /** VH/V1: DC counts in it, unlike in THD_F. */
  thdV: number | null;
  thdI: number | null;
}

export type PowerDirection = 'into-load' | 'from-load';

export interface OrderPower {
  order: number;
  voltageRms: number;
  currentRms: number;
  /** θ_h = angle of the voltage − angle of the current, (−180, 180]; null where either lies in the noise. */
  phaseDifferenceDeg: number | null;
  /** Sine form, zero time = rising zero crossing of the fundamental of the voltage. */
  voltagePhaseZeroCrossingDeg: number | null;
  currentPhaseZeroCrossingDeg: number | null;
  /** V_h I_h cos θ_h in W. */
  P: number;
  /** V_h I_h sin θ_h in var. */
  Q: number;
  /** Null where the power is zero or its sign lies in the noise. */
  direction: PowerDirection | null;
}

/** Loss factors of a transformer that feeds the current; they grow with the number of orders, so `maxOrder` belongs to them. */
export interface TransformerFactors {
  /** Highest order that counts. */
  maxOrder: number;
  /** Σ h² (I_h/I)², I = √(Σ I_h²) as measured. */
  kFactorMeasured: number | null;
  /** UL 1561: Σ h² (I_h/I_R)², I_R = rated rms current; null without a rated current. */
  kFactorRated: number | null;
  /** IEEE C57.110, harmonic loss factor of the winding eddy-current loss. */
  fhl: number | null;
  /** IEEE C57.110, harmonic loss factor of the other stray losses. */
  fhlStr: number | null;
  /** European derating factor K. */
  factorKEn: number | null;
}

export type PhaseNumber = 1 | 2 | 3;
export type Triple<T> = [T, T, T];

/** A voltage and the current that belongs to it, by channel index. */
export interface PowerPair {
  voltage: number;
  current: number;
  phase: PhaseNumber | null;
}

/** '4w': voltages to neutral; '3w': voltages to an artificial star point. */
export type Wires = '3w' | '4w';

/** Three voltages and three currents of one three-phase circuit, by channel index, phases 1, 2, 3. */
export interface ThreePhaseSet {
  voltages: Triple<number>;
  currents: Triple<number>;
  wires: Wires;
}

export interface PowerPairResult extends PowerFigures {
  voltageChannel: number;
  currentChannel: number;
  phase: PhaseNumber | null;
  frequencyHz: number;
  orders: OrderPower[];
  transformer: TransformerFactors;
}

/** One sequence component of one order. */
export interface SequencePhasor {
  rms: number;
  /** Cosine form, zero time = first sample; null where it lies in the noise. */
  phaseDeg: number | null;
}

/** Symmetrical components of one order (Fortescue 1918). */
export interface SequenceOrder {
  order: number;
  zero: SequencePhasor;
  positive: SequencePhasor;
  negative: SequencePhasor;
}

/** Of order 1, as plain numbers; null without a positive-sequence component. */
export interface Unbalance {
  /** Negative over positive sequence. */
  u2: number | null;
  /** Zero over positive sequence. */
  u0: number | null;
}

export interface NeutralOrder {
  order: number;
  rms: number;
  /** Cosine form, zero time = first sample; null where it lies in the noise. */
  phaseDeg: number | null;
}

/**
 * Effective quantities of a three-phase circuit, IEEE 1459-2010, 3.2.2 and 3.2.3, in V, A, W, var and VA. `…plus` is the
 * positive sequence of order 1 (P1+, Q1+, S1+ of the standard).
 */
export interface ThreePhaseFigures {
  /** Effective voltage and current. */
  Ve: number;
  Ie: number;
  Ve1: number;
  Ie1: number;
  Se: number;
  Se1: number;
  SeN: number | null;
  P: number;
  P1plus: number;
  Q1plus: number;
  S1plus: number;
  /** √(Se1² − S1+²): unbalance of the fundamental. */
  SU1: number | null;
  /** P/Se. */
  PFe: number | null;
  /** S of the three phases added. */
  Sarithmetic: number;
  /** rms of u1 − u2, u2 − u3, u3 − u1. */
  lineToLineRms: Triple<number>;
  /** rms of i1 + i2 + i3. */
  neutralRms: number;
}

export interface ThreePhaseResult extends ThreePhaseFigures {
  voltageChannels: Triple<number>;
  currentChannels: Triple<number>;
  wires: Wires;
  frequencyHz: number;
  phases: Triple<PowerFigures>;
  /** i1 + i2 + i3 by order. */
  neutralOrders: NeutralOrder[];
  voltageSequences: SequenceOrder[];
  currentSequences: SequenceOrder[];
  voltageUnbalance: Unbalance;
  currentUnbalance: Unbalance;
}

/** Power results of a record as plain serialisable objects. */
export interface RecordPower {
  power: PowerPairResult[];
  threePhase: ThreePhaseResult[];
}
