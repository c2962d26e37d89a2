import { AnalysisInputError } from '../errors.js';
import type { AnalysisSettings, ChannelDescription, ResolvedSettings } from '../types.js';
import type { WindowName } from '../windows/window-samples.js';
import { checkChannelSettings } from './check-channel-settings.js';

/** Highest order listed where none is stated. */
export const DEFAULT_MAX_ORDER = 50;
const HIGHEST_MAX_ORDER = 200;
/** 200 ms at 1 MHz, the highest nominal frequency that is asked for. */
const MOST_CYCLES_PER_WINDOW = 200_000;
/** Highest order in THD where none is stated: 40 as IEC 61000-3-2 lists, 10 for tones by common practice. */
export const DEFAULT_THD_ORDER = { mains: 40, general: 40, tone: 10 } as const;
const DEFAULT_WINDOW: Record<AnalysisSettings['profile'], WindowName> = {
  mains: 'hann',
  general: 'hann',
  tone: 'blackman-harris',
};
const LARGEST_KAISER_BETA = 40;
const SEGMENT_LENGTHS = { shortest: 16, longest: 2 ** 22 };
const LARGEST_OVERLAP_PERCENT = 95;

/**
 * Fills in the defaults. Settings that have none and are not given stay out.
 *
 * @param channels of the record, which settings of single channels must name
 * @throws AnalysisInputError for settings that make no sense
 */
export function resolveSettings(
  settings: AnalysisSettings,
  channels: readonly ChannelDescription[],
): ResolvedSettings {
  const { profile, nominalFrequencyHz, cyclesPerWindow, bandHz } = settings;
  if (nominalFrequencyHz !== 'auto' && !(nominalFrequencyHz > 0 && Number.isFinite(nominalFrequencyHz))) {
    throw new AnalysisInputError(
      `The nominal frequency must be a positive number of hertz or 'auto', got ${nominalFrequencyHz}.`,
    );
  }
  const maxOrder = settings.maxOrder ?? DEFAULT_MAX_ORDER;
  const thdMaxOrder = settings.thdMaxOrder ?? Math.min(DEFAULT_THD_ORDER[profile], maxOrder);
  requireInteger('The highest order', maxOrder, 1, HIGHEST_MAX_ORDER);
  requireInteger('The highest order of THD', thdMaxOrder, 1, maxOrder);
  if (cyclesPerWindow !== undefined) {
    requireInteger('The number of cycles per window', cyclesPerWindow, 2, MOST_CYCLES_PER_WINDOW);
  }
  checkSpectrumSettings(settings);
  if (
    bandHz !== undefined &&
    !(bandHz.fromHz >= 0 && bandHz.toHz > bandHz.fromHz && bandHz.toHz < Infinity)
  ) {
    throw new AnalysisInputError(
      `The band must run upwards from 0 Hz or above, got ${bandHz.fromHz} Hz to ${bandHz.toHz} Hz.`,
    );
  }
  checkChannelSettings(settings, channels);
  return {
    profile,
    nominalFrequencyHz,
    window: settings.window ?? DEFAULT_WINDOW[profile],
    maxOrder,
    thdMaxOrder,
    cyclesPerWindow:
      cyclesPerWindow ?? (nominalFrequencyHz === 'auto' ? null : cyclesFor(nominalFrequencyHz)),
    ...givenOnly(settings),
  };
}

/** 10 cycles at 50 Hz, 12 at 60 Hz (IEC 61000-4-7, 4.4.1); elsewhere the even number next to 200 ms. */
export function cyclesFor(frequencyHz: number): number {
  return Math.max(2, 2 * Math.round(0.1 * frequencyHz));
}

function checkSpectrumSettings({ kaiserBeta, segmentLength, overlapPercent }: AnalysisSettings): void {
  requireBetween('The β of the Kaiser window', kaiserBeta, 0, LARGEST_KAISER_BETA);
  requireBetween('The overlap of segments in percent', overlapPercent, 0, LARGEST_OVERLAP_PERCENT);
  if (segmentLength !== undefined) {
    const { shortest, longest } = SEGMENT_LENGTHS;
    requireInteger('The number of samples per segment', segmentLength, shortest, longest);
  }
}

const OPTIONAL_SETTINGS = [
  ...(['kaiserBeta', 'segmentLength', 'overlapPercent', 'bandHz'] as const),
  ...(['pairs', 'threePhase', 'ratedCurrentA', 'accuracy'] as const),
];

function givenOnly(settings: AnalysisSettings): Pick<ResolvedSettings, (typeof OPTIONAL_SETTINGS)[number]> {
  return Object.fromEntries(
    OPTIONAL_SETTINGS.flatMap((name) => (settings[name] === undefined ? [] : [[name, settings[name]]])),
  );
}

function requireInteger(what: string, value: number, from: number, to: number): void {
  if (Number.isInteger(value) && value >= from && value <= to) return;
  throw new AnalysisInputError(`${what} must be a whole number from ${from} to ${to}, got ${value}.`);
}

function requireBetween(what: string, value: number | undefined, from: number, to: number): void {
  if (value === undefined || (value >= from && value <= to)) return;
  throw new AnalysisInputError(`${what} must lie between ${from} and ${to}, got ${value}.`);
}
