/** Where a frequency appears after sampling: folded into 0 to half the sample rate. */
export function foldedFrequency(frequencyHz: number, sampleRateHz: number): number {
  return Math.abs(frequencyHz - sampleRateHz * Math.round(frequencyHz / sampleRateHz));
}
