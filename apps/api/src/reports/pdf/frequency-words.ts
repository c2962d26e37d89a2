import type { ChannelAnalysis } from '@overtally/contracts';
import { formatQuantity } from './format.js';

/** The engine gives one standard deviation; twice that is the expanded uncertainty (JCGM 100:2008, 6.2). */
const coverage = 2;
const gap = '\u00a0';

/** Caption and value of the fundamental's frequency; the caption names the coverage of a stated uncertainty. */
export function frequencyWords(
  fundamental: ChannelAnalysis['fundamental'],
): [caption: string, value: string] {
  if (fundamental === null) return ['Fundamental', '–'];
  const { frequencyHz, frequencyUncertaintyHz } = fundamental;
  if (frequencyUncertaintyHz === null) return ['Fundamental', formatQuantity(frequencyHz, 'Hz', 5)];
  const expandedHz = coverage * frequencyUncertaintyHz;
  // Beyond a millionth of the value the clock of the recorder rules, which the record cannot tell.
  if (expandedHz < frequencyHz * 1e-6) return ['Fundamental', formatQuantity(frequencyHz, 'Hz', 6)];
  return ['Fundamental (± at k = 2)', toOnePlace(frequencyHz, expandedHz)];
}

/** Uncertainty to two significant digits, the value to the same place (JCGM 100:2008, 7.2.6). */
function toOnePlace(valueHz: number, uncertaintyHz: number): string {
  const [divisor, unit] = valueHz < 1000 ? [1, 'Hz'] : [1000, 'kHz'];
  const place = Number((uncertaintyHz / divisor).toExponential(1).split('e')[1]);
  const decimals = Math.min(12, Math.max(0, 1 - place));
  const [value, uncertainty] = [valueHz, uncertaintyHz].map((each) => (each / divisor).toFixed(decimals));
  return `${value}${gap}± ${uncertainty}${gap}${unit}`;
}
