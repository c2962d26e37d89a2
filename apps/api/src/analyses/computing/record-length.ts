import type { ReadProblem } from '@overtally/contracts';

/**
 * Samples of all channels that one analysis may hold: they stay in memory together, 8 bytes each, beside working copies
 * of one channel. 2^28 of them take 2 GiB, which is what a machine for this work has to spare.
 */
const mostSamples = 2 ** 28;

/**
 * A problem that says how long a span may be when `length` samples of `channelCount` channels are too many for one
 * analysis; null when they are not.
 */
export function tooLongProblem(
  length: number,
  channelCount: number,
  sampleRateHz: number,
): ReadProblem | null {
  if (length * channelCount <= mostSamples) return null;
  const longestS = Math.floor(mostSamples / channelCount) / sampleRateHz;
  const channels = channelCount === 1 ? '1 channel' : `${channelCount} channels`;
  return {
    code: 'record-too-long',
    message: `${length} samples of ${channels} are more than one analysis can hold in memory.`,
    cure: `Choose a span of at most ${Number(longestS.toPrecision(3))} s, or read fewer channels.`,
  };
}
