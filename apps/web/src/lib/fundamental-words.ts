import type { ChannelAnalysis } from '@overtally/contracts';
import { formatHz, formatWithUncertainty, none } from './format.js';

/** The engine gives one standard deviation; twice that is the expanded uncertainty (JCGM 100:2008, 6.2). */
const coverage = 2;

/** Frequency of the fundamental with its expanded uncertainty: 49.98100 ± 0.00020 Hz. */
export function fundamentalWords(channel: Pick<ChannelAnalysis, 'fundamental'> | null): string {
  const fundamental = channel?.fundamental;
  if (!fundamental) return none;
  const { frequencyHz, frequencyUncertaintyHz } = fundamental;
  if (frequencyUncertaintyHz === null) return formatHz(frequencyHz);
  const expanded = coverage * frequencyUncertaintyHz;
  // Beyond a millionth of the value the clock of the recorder rules, which the record cannot tell.
  if (expanded < frequencyHz * 1e-6) return formatHz(frequencyHz, 4);
  // A narrow cell may break before the sign, so that it has no need to break within a number.
  return formatWithUncertainty(frequencyHz, expanded, 'Hz').replace('\u00a0±', ' ±');
}
