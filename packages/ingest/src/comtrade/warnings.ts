import type { ImportOptions, ReadChannel, ReadWarning } from '../types.js';
import type { CffHead } from './cff.js';

/** Warnings about data that are not as many as the file says. */
export function dataWarnings({ config }: CffHead, frames: number, cut: boolean): ReadWarning[] {
  const { lastSample } = config;
  if (lastSample !== null && frames < lastSample) {
    const message = `The configuration claims ${lastSample} samples per channel but the file ends after ${frames}; what is there was read.`;
    return [{ code: 'truncated', message, count: 1, samples: [frames] }];
  }
  if (cut) {
    const message = 'The last record is not whole and was dropped.';
    return [{ code: 'truncated', message, count: 1, samples: [frames] }];
  }
  if (lastSample !== null && frames > lastSample) {
    const message = `The file holds ${frames} samples per channel, the configuration claims ${lastSample}; all were read.`;
    return [{ code: 'sample-count-differs', message }];
  }
  return [];
}

/** Warnings about what the configuration holds and the reading leaves as it is. */
export function configWarnings(
  { config }: CffHead,
  channels: ReadChannel[],
  options: ImportOptions,
): ReadWarning[] {
  const found: ReadWarning[] = [];
  const skewOf = ({ column }: ReadChannel) => config.analog[column]?.skewUs ?? 0;
  const skewed = channels.filter((channel) => skewOf(channel) !== 0);
  if (skewed.length > 0) {
    const named = skewed.slice(0, 20).map((channel) => `"${channel.name}" by ${skewOf(channel)} µs`);
    const more = skewed.length > 20 ? ` and ${skewed.length - 20} more` : '';
    const message = `Channels were sampled later than the first of their record: ${named.join(', ')}${more}. Nothing was corrected; phase angles between channels hold this delay.`;
    found.push({ code: 'channel-skew', message, count: skewed.length });
  }
  if (config.statusCount > 0 && (options.channels ?? []).length === 0) {
    const message = `${config.statusCount} status channels (on or off) were left out; only analog channels are read.`;
    found.push({ code: 'status-channels-left-out', message, count: config.statusCount });
  }
  return found;
}
