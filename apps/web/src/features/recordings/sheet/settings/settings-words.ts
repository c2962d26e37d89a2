import type { Settings } from '@overtally/contracts';
import { formatCount, formatDuration, formatHz, formatPercent, formatSi } from '../../../../lib/format.js';

/** Settings of an analysis in a line: "mains, fundamental searched, orders to 50, whole record". */
export function settingsWords(settings: Settings): string {
  const { profile, nominalFrequencyHz, maxOrder, thdMaxOrder, cyclesPerWindow, span } = settings;
  const words = [
    profile,
    nominalFrequencyHz === 'auto'
      ? 'fundamental searched'
      : `nominal ${formatHz(nominalFrequencyHz, Number.isInteger(nominalFrequencyHz) ? 0 : 2)}`,
  ];
  if (maxOrder !== undefined) words.push(`orders to ${maxOrder}`);
  if (thdMaxOrder !== undefined) words.push(`THD to order ${thdMaxOrder}`);
  words.push(...spectrumWords(settings));
  if (cyclesPerWindow !== undefined) words.push(`${cyclesPerWindow} cycles per window`);
  words.push(...channelWords(settings));
  words.push(span ? spanWords(span) : 'whole record');
  return words.join(', ');
}

function spectrumWords({ window, kaiserBeta, segmentLength, overlapPercent, bandHz }: Settings): string[] {
  const words = [];
  if (window !== undefined) words.push(`${window} window for the drawn spectrum`);
  if (window === 'kaiser' && kaiserBeta !== undefined) words.push(`β ${kaiserBeta}`);
  if (segmentLength !== undefined) words.push(`segments of ${formatCount(segmentLength)} samples`);
  if (overlapPercent !== undefined) words.push(`overlap ${formatPercent(overlapPercent, 0)}`);
  if (bandHz) words.push(`THD+N from ${formatHz(bandHz.fromHz, 0)} to ${formatHz(bandHz.toHz, 0)}`);
  return words;
}

function channelWords({ pairs, threePhase, ratedCurrentA, accuracy }: Settings): string[] {
  const words = [];
  if (pairs) words.push(pairs.length === 1 ? '1 pair chosen' : `${pairs.length} pairs chosen`);
  if (threePhase?.length) {
    words.push(
      threePhase.length === 1 ? '1 set of three phases' : `${threePhase.length} sets of three phases`,
    );
  }
  if (ratedCurrentA !== undefined) words.push(`rated ${formatSi(ratedCurrentA, 'A', { trim: true })}`);
  if (accuracy?.length) {
    words.push(`accuracy stated of ${accuracy.length === 1 ? '1 channel' : `${accuracy.length} channels`}`);
  }
  return words;
}

const spanWords = ({ fromS, toS }: NonNullable<Settings['span']>) =>
  `${formatDuration(fromS)} to ${formatDuration(toS)}`;

/** What was analysed, within a sentence: "the whole record", "1.20 s to 3.40 s of the record". */
export const extentWords = ({ span }: Pick<Settings, 'span'>): string =>
  span ? `${spanWords(span)} of the record` : 'the whole record';
