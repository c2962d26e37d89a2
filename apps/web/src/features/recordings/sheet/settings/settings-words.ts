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
  words.push(span ? `${formatDuration(span.fromS)} to ${formatDuration(span.toS)}` : 'whole record');
  return words.join(', ');
}
