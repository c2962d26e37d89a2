import type { HarmonicFamily, SpectralLine } from './peaks/types.js';
import type { PowerPairResult, ThreePhaseResult } from './power/types.js';
import type { WindowName } from './windows/window-samples.js';

export type ProfileName = 'mains' | 'tone' | 'general';

/** What is known of the measuring chain of a channel, for the uncertainties. */
export interface ChannelAccuracy {
  /** Index of the channel. */
  channel: number;
  /** ± limits of the instrument in percent of reading (rectangular distribution). */
  readingPercent: number;
  /** Expanded uncertainty (k = 2) of its calibration in percent of reading. */
  calibrationPercent: number;
}

export interface PowerPairSetting {
  voltage: number;
  current: number;
  phase?: 1 | 2 | 3 | undefined;
}

export interface ThreePhaseSetting {
  voltages: [number, number, number];
  currents: [number, number, number];
  wires: '3w' | '4w';
}

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
  cyclesPerWindow?: number | undefined;
  /** Shape β of the Kaiser window, default 9. */
  kaiserBeta?: number | undefined;
  /** General: samples per averaged segment and their overlap in percent (default 50). */
  segmentLength?: number | undefined;
  overlapPercent?: number | undefined;
  /** Tone: band of the band-limited THD+N. */
  bandHz?: { fromHz: number; toHz: number } | undefined;
  /** Guessed from names and quantities when absent. */
  pairs?: PowerPairSetting[] | undefined;
  threePhase?: ThreePhaseSetting[] | undefined;
  ratedCurrentA?: number | undefined;
  accuracy?: ChannelAccuracy[] | undefined;
}

/** Settings with their defaults filled in. */
export interface ResolvedSettings extends Omit<AnalysisSettings, 'cyclesPerWindow'> {
  window: WindowName;
  maxOrder: number;
  thdMaxOrder: number;
  /** null: follows from the fundamental that is found. */
  cyclesPerWindow: number | null;
}

/** A channel without its samples. */
export interface ChannelDescription {
  /** Names the channel within its record. */
  index: number;
  name: string;
  quantity: string;
  unit: string;
  /** Full-scale ends of an integer format, in engineering values. */
  lowestCode?: number | undefined;
  highestCode?: number | undefined;
}

export interface ChannelInput extends ChannelDescription {
  /** Engineering values. */
  samples: Float64Array;
}

/** A record in memory; all channels have the same number of samples. */
export interface RecordInput {
  sampleRateHz: number;
  channels: ChannelInput[];
  /** Samples in rising order before which time is missing, as a reader of the file sees it; their windows are flagged. */
  gapsBefore?: readonly number[] | undefined;
  settings: AnalysisSettings;
}

/** A record whose samples are read when they are needed. */
export interface RecordSource {
  sampleRateHz: number;
  /** Samples of each channel. */
  sampleCount: number;
  channels: ChannelDescription[];
  /** Samples in rising order before which time is missing, as a reader of the file sees it; their windows are flagged. */
  gapsBefore?: readonly number[] | undefined;
  settings: AnalysisSettings;
}

export interface AnalyseOptions {
  /** Share done, 0 to 1. */
  onProgress?: (fraction: number) => void;
  /** Asked between steps; true stops the analysis with AnalysisStopped. */
  shouldStop?: () => boolean;
}

export type FlagSeverity = 'info' | 'warning' | 'error';

/** What a flag rests on. */
export interface FlagEvidence {
  /** How often it was seen. */
  count: number;
  /** The first places (at most 20), seconds from the first sample. */
  timesS: number[];
  /** The figure that was compared, with what, and their unit. */
  value: number | null;
  limit: number | null;
  unit: string | null;
}

export interface Flag {
  code: string;
  severity: FlagSeverity;
  message: string;
  evidence: FlagEvidence | null;
}

export type UncertaintySource =
  'calibration' | 'accuracy' | 'quantisation' | 'noise' | 'synchronisation' | 'fit';

/** Expanded uncertainty of a figure by the GUM (JCGM 100), in the unit of the figure. */
export interface Uncertainty {
  expanded: number;
  /** k, 2 for about 95 %. */
  coverageFactor: number;
  /** Standard uncertainties, combined by root sum of squares, the largest first. */
  contributors: { source: UncertaintySource; standard: number }[];
}

/** Over the windows of a record; flagged windows are left out. Percentiles by nearest rank. */
export interface Statistics {
  mean: number;
  max: number;
  p95: number;
  p99: number;
}

export interface HarmonicResult {
  order: number;
  frequencyHz: number;
  /**
   * mains: root mean square of the single line over all windows; otherwise of the whole-record fit, or of a record of more
   * than 2^20 samples the magnitude of the mean phasor of its windows.
   */
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
  /** Expanded uncertainty (k = 2) of `rms`. */
  uncertainty: number | null;
  groupStatistics: Statistics | null;
  subgroupStatistics: Statistics | null;
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
  /** One standard deviation (Cramér-Rao, from the residual of the fit); null when the frequency drifts or wanders. */
  frequencyUncertaintyHz: number | null;
}

/** The synchronous windows of the mains profile. */
export interface WindowsResult {
  cycles: number;
  count: number;
  samplesPerWindow: number;
  flaggedCount: number;
  /** Largest deviation of a window from whole cycles of the channel's own fundamental; null where that is not known. */
  synchronisationErrorPercent: number | null;
  /** Channel whose fundamental sets the windows of all channels. */
  gridChannel: number;
}

export interface SpectrumResult {
  startHz: number;
  stepHz: number;
  /** One-sided rms amplitude spectrum from DC to half the sample rate. */
  rms: Float64Array;
  window: WindowName;
  /** Equivalent noise bandwidth of a line. */
  noiseBandwidthHz: number;
  /** Segments averaged. */
  segments: number;
}

export interface ToneFigures {
  thdPlusNPercent: number | null;
  sinadDb: number | null;
  snrDb: number | null;
  sfdrDb: number | null;
  enobBits: number | null;
}

/** Figures of the tone profile beside `ToneFigures` (IEEE 1241, IEC 60268-3). */
export interface ToneDetails {
  levelDbfs: number | null;
  enobFullScaleBits: number | null;
  /** Unit of the channel per √Hz. */
  noiseDensity: number | null;
  thdPlusNBandPercent: number | null;
  bandHz: { fromHz: number; toHz: number } | null;
  /** Orders 2, 3, … relative to the tone. */
  harmonicsDbc: (number | null)[];
}

/** A band of 200 Hz between 2 kHz and 9 kHz (IEC 61000-4-7, annex B). */
export interface BandResult {
  centreHz: number;
  /** Root mean square and maximum over the windows. */
  rms: number;
  maxRms: number;
}

/** Frequency by counted cycles over 10 s (IEC 61000-4-30, 5.1). */
export interface CountedFrequency {
  startS: number;
  frequencyHz: number;
  cycles: number;
}

/** Percent, over the windows; see `WindowSeries`. */
export interface DistortionStatistics {
  thd: Statistics;
  thdg: Statistics | null;
  thds: Statistics | null;
  pwhd: Statistics | null;
}

/** Figures of a channel window by window (mains). Two-dimensional arrays hold one row of `count` windows per order. */
export interface WindowSeries {
  count: number;
  intervalS: number;
  startS: Float64Array;
  /** 1 where the window holds a gap, a step or a clipped crest. */
  flagged: Uint8Array;
  /** Of the channel that sets the windows, per window. */
  frequencyHz: Float64Array;
  rms: Float64Array;
  /** Percent, NaN where it does not apply: of the single lines, of the groups, of the subgroups (IEC 61000-4-7, 3.3). */
  thd: Float64Array;
  thdg: Float64Array;
  thds: Float64Array;
  /** Percent, of the single lines of orders 14 to 40; NaN where the orders do not reach 40. */
  pwhd: Float64Array;
  /** Orders 1.. (rows). NaN where the record ends below the group. */
  orders: number;
  line: Float64Array;
  group: Float64Array;
  subgroup: Float64Array;
  /** Cosine-form phase of each order at the start of its window, degrees. */
  phaseDeg: Float64Array;
  /** Between orders 0 and 1, 1 and 2, … (rows). */
  interharmonicGroup: Float64Array;
  centredSubgroup: Float64Array;
  /** Rows of the 200 Hz bands with these centres; empty where the sample rate does not allow them. */
  bandCentresHz: Float64Array;
  band: Float64Array;
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
  windows: WindowsResult | null;
  tone: ToneDetails | null;
  distortion: DistortionStatistics | null;
  bands: BandResult[];
  countedFrequency: CountedFrequency[];
  lines: SpectralLine[];
  families: HarmonicFamily[];
  /** By the name of the figure: rms, fundamental.rms, fundamental.frequencyHz, thdFPercent, … */
  uncertainty: Record<string, Uncertainty>;
  series: WindowSeries | null;
  flags: Flag[];
  spectrum: SpectrumResult;
}

export interface RecordAnalysis {
  engineVersion: string;
  settings: ResolvedSettings;
  channels: ChannelAnalysis[];
  power: PowerPairResult[];
  threePhase: ThreePhaseResult[];
}
