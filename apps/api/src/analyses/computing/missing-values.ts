import type { ReadProblem } from '@overtally/contracts';

/**
 * A problem that says how many samples of a channel are missing (NaN), where the first one is and which span is the
 * longest without; null when none is missing.
 * @param first index of `samples[0]` in the record
 */
export function missingValuesProblem(
  channelName: string,
  samples: Float64Array,
  first: number,
  sampleRateHz: number,
): ReadProblem | null {
  let missing = 0;
  let firstMissing = -1;
  let runStart = 0;
  let longest = { from: 0, to: 0 };
  for (let i = 0; i <= samples.length; i += 1) {
    if (i < samples.length && !Number.isNaN(samples[i])) continue;
    if (i - runStart > longest.to - longest.from) longest = { from: runStart, to: i };
    runStart = i + 1;
    if (i === samples.length) break;
    missing += 1;
    if (firstMissing < 0) firstMissing = i;
  }
  if (missing === 0) return null;
  const at = (index: number) => `${(first + index) / sampleRateHz} s`;
  const values = missing === 1 ? '1 value is' : `${missing} values are`;
  return {
    code: 'missing-values',
    message: `${values} missing in channel “${channelName}”, the first at sample ${first + firstMissing + 1} (${at(firstMissing)}).`,
    cure:
      longest.to - longest.from < 2
        ? 'No part of the record is free of gaps; capture again or mend the file.'
        : `Analyse a span without gaps: the longest runs from ${at(longest.from)} to ${at(longest.to)}.`,
  };
}
