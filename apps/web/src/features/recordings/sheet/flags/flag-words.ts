import type { Flag } from '@overtally/contracts';

const titles: Record<string, string> = {
  'adc-saturated': 'Converter at its end',
  clipped: 'Waveform clipped',
  'dc-heavy': 'Much DC',
  discontinuity: 'Jump in the record',
  'frequency-drift': 'Frequency moves',
  'low-resolution': 'Few codes of the converter',
  'near-nyquist': 'Content near half the sample rate',
  'not-synchronous': 'Windows miss whole cycles',
  'too-short-one-cycle': 'Less than one cycle',
  'too-short-ten-cycles': 'Less than one window',
  'no-periodic-component': 'No fundamental found',
  'order-beyond-nyquist': 'Orders beyond half the sample rate',
  'data-size-unknown': 'Length not stated in the file',
  'data-size-zero': 'Length not stated in the file',
};

/** Heading of a flag or a reader's warning; a code without one of its own is spelled out. */
export function codeTitle(code: string): string {
  const words = code.replaceAll(/[-_]/g, ' ');
  return titles[code] ?? words.charAt(0).toUpperCase() + words.slice(1);
}

export const severity: Record<Flag['severity'], { tone: 'over' | 'near' | 'act'; words: string }> = {
  error: { tone: 'over', words: 'error' },
  warning: { tone: 'near', words: 'warning' },
  info: { tone: 'act', words: 'information' },
};

/** The figure of the sheet that a flag speaks of. */
export type FlagPlace = 'waveform' | 'spectrum' | 'windows';

const places: Record<string, FlagPlace> = {
  'near-nyquist': 'spectrum',
  'no-periodic-component': 'spectrum',
  'order-beyond-nyquist': 'spectrum',
  'frequency-drift': 'windows',
  'not-synchronous': 'windows',
  'too-short-one-cycle': 'windows',
  'too-short-ten-cycles': 'windows',
};

/** Flags beside the figure they speak of; those of windows stand at the waveform where there are none. */
export function flagsAt(flags: readonly Flag[], place: FlagPlace, hasWindows: boolean): Flag[] {
  return flags.filter(({ code }) => {
    const own = places[code] ?? 'waveform';
    return (own === 'windows' && !hasWindows ? 'waveform' : own) === place;
  });
}
