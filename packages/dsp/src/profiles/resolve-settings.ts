import { AnalysisInputError } from '../errors.js';
import type { AnalysisSettings, ResolvedSettings } from '../types.js';
import type { WindowName } from '../windows/window-samples.js';

const DEFAULT_MAX_ORDER = 50;
const HIGHEST_MAX_ORDER = 200;
/** 200 ms at 1 MHz, the highest nominal frequency that is asked for. */
const MOST_CYCLES_PER_WINDOW = 200_000;
const DEFAULT_THD_ORDER = { mains: 40, general: 40, tone: 10 } as const;
const DEFAULT_WINDOW: Record<AnalysisSettings['profile'], WindowName> = {
  mains: 'hann',
  general: 'hann',
  tone: 'blackman-harris',
};

/** Fills in the defaults; throws AnalysisInputError for settings that make no sense. */
export function resolveSettings(settings: AnalysisSettings): ResolvedSettings {
  const { profile, nominalFrequencyHz } = settings;
  if (nominalFrequencyHz !== 'auto' && !(nominalFrequencyHz > 0 && Number.isFinite(nominalFrequencyHz))) {
    throw new AnalysisInputError(
      `The nominal frequency must be a positive number of hertz or 'auto', got ${nominalFrequencyHz}.`,
    );
  }
  const maxOrder = settings.maxOrder ?? DEFAULT_MAX_ORDER;
  const thdMaxOrder = settings.thdMaxOrder ?? Math.min(DEFAULT_THD_ORDER[profile], maxOrder);
  requireInteger('The highest order', maxOrder, 1, HIGHEST_MAX_ORDER);
  requireInteger('The highest order of THD', thdMaxOrder, 1, maxOrder);
  if (settings.cyclesPerWindow !== undefined) {
    requireInteger('The number of cycles per window', settings.cyclesPerWindow, 2, MOST_CYCLES_PER_WINDOW);
  }
  return {
    profile,
    nominalFrequencyHz,
    window: settings.window ?? DEFAULT_WINDOW[profile],
    maxOrder,
    thdMaxOrder,
    cyclesPerWindow:
      settings.cyclesPerWindow ?? (nominalFrequencyHz === 'auto' ? null : cyclesFor(nominalFrequencyHz)),
  };
}

/** 10 cycles at 50 Hz, 12 at 60 Hz (IEC 61000-4-7, 4.4.1); elsewhere the even number next to 200 ms. */
export function cyclesFor(frequencyHz: number): number {
  return Math.max(2, 2 * Math.round(0.1 * frequencyHz));
}

function requireInteger(what: string, value: number, from: number, to: number): void {
  if (Number.isInteger(value) && value >= from && value <= to) return;
  throw new AnalysisInputError(`${what} must be a whole number from ${from} to ${to}, got ${value}.`);
}
