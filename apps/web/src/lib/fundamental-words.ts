import type { ChannelAnalysis } from '@overtally/contracts';
import { formatWithUncertainty } from './format-uncertainty.js';
import { formatHz, none } from './format.js';

/** The engine gives one standard deviation; twice that is the expanded uncertainty (JCGM 100:2008, 6.2). */
const coverage = 2;

/** Beyond a millionth of the value the clock of the recorder rules, which the record cannot tell. */
export const isBelowClock = (expandedHz: number, frequencyHz: number): boolean =>
  expandedHz < frequencyHz * 1e-6;

/** Frequency of the fundamental with its expanded uncertainty: 49.98100 ± 0.00020 Hz. */
export function fundamentalWords(channel: Pick<ChannelAnalysis, 'fundamental'> | null): string {
  const fundamental = channel?.fundamental;
  if (!fundamental) return none;
  const { frequencyHz, frequencyUncertaintyHz } = fundamental;
  if (frequencyUncertaintyHz === null) return formatHz(frequencyHz);
  const expanded = coverage * frequencyUncertaintyHz;
  if (isBelowClock(expanded, frequencyHz)) return formatHz(frequencyHz, 4);
  // A narrow cell may break before the sign, so that it has no need to break within a number.
  return formatWithUncertainty(frequencyHz, expanded, 'Hz').replace('\u00a0±', ' ±');
}
