import type { ReadProblem } from '@overtally/contracts';

/** Counts the samples of a channel that are missing (NaN) while they go by, and finds the longest run without. */
export class MissingValues {
  private seen = 0;
  private missing = 0;
  private firstMissing = -1;
  private runStart = 0;
  private longest = { from: 0, to: 0 };

  /** Takes the next samples. */
  add(samples: Float64Array): void {
    for (let i = 0; i < samples.length; i += 1) {
      if (!Number.isNaN(samples[i])) continue;
      const at = this.seen + i;
      this.closeRun(at);
      this.missing += 1;
      if (this.firstMissing < 0) this.firstMissing = at;
    }
    this.seen += samples.length;
  }

  /**
   * A problem that says how many samples are missing, where the first one is and which span is the longest without; null
   * when none is missing.
   * @param first index in the record of the first sample that was taken
   */
  problem(channelName: string, first: number, sampleRateHz: number): ReadProblem | null {
    this.closeRun(this.seen);
    const { missing, firstMissing, longest } = this;
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

  private closeRun(end: number): void {
    if (end - this.runStart > this.longest.to - this.longest.from) {
      this.longest = { from: this.runStart, to: end };
    }
    this.runStart = end + 1;
  }
}
