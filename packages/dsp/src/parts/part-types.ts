import type { FundamentalEstimate } from '../fundamental/find-fundamental.js';
import type { TrackFrames } from '../fundamental/frequency-track.js';
import type { PhasorSet } from '../power/types.js';
import type { ToneResult } from '../tone/tone-result.js';
import type { AnalyseOptions, ChannelDescription, ResolvedSettings } from '../types.js';
import type { ChannelScan } from './channel-scan.js';
import type { SampleRange } from './reading.js';
import type { SpectrumPlan, SpectrumSum } from './spectrum-segments.js';
import type { WindowChunk, WindowPlan } from './window-chunk.js';

/** Items `from` up to but not including `to` of a list. */
export interface IndexRange {
  from: number;
  to: number;
}

/** What every part knows of its channel and record. */
export interface PartContext {
  channel: ChannelDescription;
  sampleRateHz: number;
  sampleCount: number;
  settings: ResolvedSettings;
}

/** Finds the fundamental, on the whole record or, of a long one, on a stretch of it. */
export interface LocatePart extends PartContext {
  kind: 'locate';
}

/** One pass over all samples: refuses what is no number, figures of the waveform, evidence for flags. */
export interface ScanPart extends PartContext {
  kind: 'scan';
  fundamentalHz: number | null;
}

/** Phase of the fundamental in a range of the frames of the frequency track. */
export interface TrackPart extends PartContext {
  kind: 'track';
  carrierHz: number;
  frames: IndexRange;
}

/** A range of the segments of the averaged spectrum. */
export interface SpectrumPart extends PartContext {
  kind: 'spectrum';
  plan: SpectrumPlan;
  segments: IndexRange;
}

/** Least-squares fit of the orders of a given fundamental to the whole record. */
export interface OrdersPart extends PartContext {
  kind: 'orders';
  fundamentalHz: number;
}

/** Single-tone figures of a stretch. */
export interface TonePart extends PartContext {
  kind: 'tone';
  fundamentalHz: number;
  stretch: SampleRange;
}

/** A range of the synchronous windows. */
export interface WindowsPart extends PartContext {
  kind: 'windows';
  plan: WindowPlan;
}

/**
 * A piece of the analysis of a record that reads the samples of one channel and needs nothing else. Plain data, fit for
 * the structured clone between threads.
 */
export type AnalysisPart =
  LocatePart | ScanPart | TrackPart | SpectrumPart | OrdersPart | TonePart | WindowsPart;

interface PartResults {
  locate: FundamentalEstimate | null;
  scan: ChannelScan;
  track: TrackFrames;
  spectrum: SpectrumSum;
  orders: PhasorSet;
  tone: ToneResult;
  windows: WindowChunk;
}

/** What a part of this kind gives, plain data as well. */
export type PartResultOf<Kind extends AnalysisPart['kind']> = PartResults[Kind];

export type PartResult = PartResultOf<AnalysisPart['kind']>;

/**
 * Has a part computed, here (`computePart`) or in another thread.
 *
 * @param onProgress takes the share of the part that is done, 0 to 1; may be left alone
 */
export type RunPart = (part: AnalysisPart, onProgress: (fraction: number) => void) => Promise<PartResult>;

export interface AnalyseSourceOptions extends AnalyseOptions {
  runPart: RunPart;
  /** How many parts may be under way at a time, default 1. The figures do not depend on it. */
  parallel?: number | undefined;
}
