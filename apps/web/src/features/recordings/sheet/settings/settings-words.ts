import type { Settings } from '@overtally/contracts';
import { formatDuration, formatHz } from '../../../../lib/format.js';

/** Settings of an analysis in a line: "mains, fundamental searched, orders to 50, whole record". */
export function settingsWords(settings: Settings): string {
  const { profile, nominalFrequencyHz, maxOrder, thdMaxOrder, window, cyclesPerWindow, span } = settings;
  const words = [
    profile,
    nominalFrequencyHz === 'auto'
      ? 'fundamental searched'
      : `nominal ${formatHz(nominalFrequencyHz, Number.isInteger(nominalFrequencyHz) ? 0 : 2)}`,
  ];
  if (maxOrder !== undefined) words.push(`orders to ${maxOrder}`);
  if (thdMaxOrder !== undefined) words.push(`THD to order ${thdMaxOrder}`);
  if (window !== undefined) words.push(`${window} window for the drawn spectrum`);
  if (cyclesPerWindow !== undefined) words.push(`${cyclesPerWindow} cycles per window`);
  words.push(span ? spanWords(span) : 'whole record');
  return words.join(', ');
}

const spanWords = ({ fromS, toS }: NonNullable<Settings['span']>) =>
  `${formatDuration(fromS)} to ${formatDuration(toS)}`;

/** What was analysed, within a sentence: "the whole record", "1.20 s to 3.40 s of the record". */
export const extentWords = ({ span }: Pick<Settings, 'span'>): string =>
  span ? `${spanWords(span)} of the record` : 'the whole record';
