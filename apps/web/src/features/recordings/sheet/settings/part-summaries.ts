import type { Channel } from '@overtally/contracts';
import { proposalWords } from './pairing-values.js';
import type { SettingsForm } from './settings-form.js';

/** What the closed part of the spectrum holds. */
export function spectrumSummary({
  window,
  kaiserBeta,
  profile,
  segmentLength,
  overlapPercent,
}: SettingsForm) {
  const words = [window === '' ? 'window as the profile has it' : `${window} window`];
  if (window === 'kaiser' && kaiserBeta) words.push(`β ${kaiserBeta}`);
  if (profile === 'general' && segmentLength) words.push(`segments of ${segmentLength} samples`);
  if (profile === 'general' && overlapPercent) words.push(`overlap ${overlapPercent} %`);
  return words.join(', ');
}

/** What the closed part of power holds. */
export function pairingSummary(
  { pairing, pairs, sets, ratedCurrentA }: SettingsForm,
  channels: readonly Pick<Channel, 'index' | 'name' | 'quantity' | 'unit'>[],
) {
  const words = [pairing === 'proposed' ? proposalWords(channels) : chosenWords(pairs.length, sets.length)];
  if (ratedCurrentA) words.push(`rated current ${ratedCurrentA} A`);
  return words.join('; ');
}

function chosenWords(pairs: number, sets: number): string {
  if (pairs === 0 && sets === 0) return 'no power';
  const words = [pairs === 1 ? '1 pair' : `${pairs} pairs`];
  if (sets > 0) words.push(sets === 1 ? '1 set of three phases' : `${sets} sets of three phases`);
  return `${words.join(', ')}, chosen`;
}

/** What the closed part of the measuring chain holds. */
export function chainSummary({ accuracy }: SettingsForm) {
  const stated = accuracy.filter((row) => row.readingPercent || row.calibrationPercent);
  if (stated.length === 0) return 'accuracy not stated: uncertainties hold for the record alone';
  return `accuracy stated of ${stated.map(({ name }) => name).join(', ')}`;
}
