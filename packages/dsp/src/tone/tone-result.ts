import type { ToneDetails, ToneFigures } from '../types.js';

/** A band of frequencies with sharp edges, both ends included. */
export interface FrequencyBand {
  fromHz: number;
  toHz: number;
}

export interface ToneOptions {
  /** Harmonics 2..maxOrder belong to the distortion; default 10 (IEEE 1241). */
  maxOrder?: number | undefined;
  /** Peak amplitude of a full-scale sine in units of the samples; without it nothing is referred to full scale. */
  fullScalePeak?: number | undefined;
  /** Band of a second THD+N that counts nothing outside it. */
  band?: FrequencyBand | undefined;
}

/** A line besides tone and DC. */
export interface Spur {
  frequencyHz: number;
  power: number;
}

/** Mean powers (squares of rms values) of a stretch, in the squared unit of the samples. */
export interface TonePowers {
  sampleCount: number;
  sampleRateHz: number;
  frequencyHz: number;
  dc: number;
  tone: number;
  /** Orders 2, 3, …, folded ones where they appear; null where an order cannot be told from another line or DC. */
  harmonics: (Spur | null)[];
  /** Everything but tone and DC. */
  noiseAndDistortion: number;
  /** The same without the harmonics. */
  noise: number;
  /** The same within the band that was asked for; null without one. */
  bandNoiseAndDistortion: number | null;
  /** Square of the median noise density, unit²/Hz. */
  noiseDensitySquared: number;
  /** The largest lines besides tone, harmonics and DC, largest first. */
  spurs: Spur[];
}

/** Single-tone quality figures. Levels are null when the power they compare with is mere rounding. */
export interface ToneResult extends ToneFigures, ToneDetails {
  frequencyHz: number;
  /** rms value of the tone. */
  rms: number;
  dc: number;
  thdFPercent: number | null;
  thdRPercent: number | null;
  /** Frequency of the largest line besides the tone. */
  spurFrequencyHz: number | null;
  /** What the figures rest on, for combining stretches of a long record. */
  powers: TonePowers;
}
