import type { WindowName } from './windows/window-samples.js';

export type ProfileName = 'mains' | 'tone' | 'general';

export interface AnalysisSettings {
  profile: ProfileName;
  /** Search ±15 % around this frequency, or 'auto' for the whole range. */
  nominalFrequencyHz: number | 'auto';
  /** Window of the drawn spectrum. The mains windows are always rectangular. */
  window?: WindowName;
  /** Highest order listed, default 50. */
  maxOrder?: number;
  /** Highest order in THD, default 40 (mains, general) or 10 (tone). */
  thdMaxOrder?: number;
  /** Mains: cycles per window, default 10 at 50 Hz, 12 at 60 Hz, otherwise the even number next to 200 ms. */
  cyclesPerWindow?: number;
}

export interface ResolvedSettings {
  profile: ProfileName;
  nominalFrequencyHz: number | 'auto';
  window: WindowName;
  maxOrder: number;
  thdMaxOrder: number;
  /** null: follows from the fundamental that is found. */
  cyclesPerWindow: number | null;
}

export interface ChannelInput {
  index: number;
  name: string;
  quantity: string;
  unit: string;
  /** Engineering values. */
  samples: Float64Array;
  /** Full-scale ends of an integer format, in engineering values. */
  lowestCode?: number;
  highestCode?: number;
}

export interface RecordInput {
  sampleRateHz: number;
  channels: ChannelInput[];
  settings: AnalysisSettings;
}

export interface AnalyseOptions {
  /** Share done, 0 to 1. */
  onProgress?: (fraction: number) => void;
  /** Asked between steps; true stops the analysis with AnalysisStopped. */
  shouldStop?: () => boolean;
}

export type FlagSeverity = 'info' | 'warning' | 'error';

export interface Flag {
  code: string;
  severity: FlagSeverity;
  message: string;
}

export interface HarmonicResult {
  order: number;
  frequencyHz: number;
  /** mains: root mean square of the single line over all windows; otherwise of the whole-record fit. */
  rms: number;
  percentOfFundamental: number | null;
  /** Cosine form, zero time = first sample. Null below 0.1 % of the largest order or within the noise. */
  phaseDeg: number | null;
  /** Sine form, zero time = rising zero crossing of the channel's own fundamental. */
  phaseZeroCrossingDeg: number | null;
  groupRms: number | null;
  subgroupRms: number | null;
  /** Mean and largest of the 1.5 s smoothed group values. */
  smoothedMeanRms: number | null;
  smoothedMaxRms: number | null;
}

export interface InterharmonicResult {
  betweenOrders: [number, number];
  groupRms: number | null;
  centredSubgroupRms: number | null;
}

export interface FundamentalResult {
  frequencyHz: number;
  rms: number;
  /** Cosine form, zero time = first sample; null when the frequency drifts. */
  phaseDeg: number | null;
  /** One standard deviation (Cramér-Rao, from the residual of the fit); null when the frequency drifts. */
  frequencyUncertaintyHz: number | null;
}

export interface SpectrumResult {
  startHz: number;
  stepHz: number;
  /** One-sided rms amplitude spectrum from DC to half the sample rate. */
  rms: Float64Array;
  window: WindowName;
}

export interface ToneFigures {
  thdPlusNPercent: number | null;
  sinadDb: number | null;
  snrDb: number | null;
  sfdrDb: number | null;
  enobBits: number | null;
}

export interface ChannelAnalysis extends ToneFigures {
  index: number;
  name: string;
  quantity: string;
  unit: string;
  /** DC component: X0 of the harmonic model, the arithmetic mean when there is no periodic component. */
  mean: number | null;
  rms: number | null;
  peak: number | null;
  crestFactor: number | null;
  formFactor: number | null;
  fundamental: FundamentalResult | null;
  thdFPercent: number | null;
  thdRPercent: number | null;
  thdMaxOrder: number;
  harmonics: HarmonicResult[];
  /** mains only. */
  interharmonics: InterharmonicResult[];
  windows: { cycles: number; count: number; samplesPerWindow: number } | null;
  flags: Flag[];
  spectrum: SpectrumResult;
}

export interface RecordAnalysis {
  engineVersion: string;
  settings: ResolvedSettings;
  channels: ChannelAnalysis[];
}
