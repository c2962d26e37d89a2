import { AnalysisInputError } from '../errors.js';
import type { RecordInput } from '../types.js';

/** Beyond it, the squares of a long record and of its spectrum would no longer be finite numbers. */
const largestValue = 1e100;

/** Refuses what cannot be analysed, naming the channel and the sample. */
export function checkInput({ sampleRateHz, channels }: RecordInput): void {
  if (!(sampleRateHz > 0 && Number.isFinite(sampleRateHz))) {
    throw new AnalysisInputError(`The sample rate must be a positive number of hertz, got ${sampleRateHz}.`);
  }
  for (const { name, samples } of channels) {
    if (samples.length < 2) {
      throw new AnalysisInputError(
        `Channel '${name}' holds ${samples.length} samples; an analysis needs at least 2.`,
      );
    }
    const bad = samples.findIndex((x) => !Number.isFinite(x));
    if (bad >= 0) {
      throw new AnalysisInputError(
        `Channel '${name}' has no number at sample ${bad} (${bad / sampleRateHz} s). ` +
          'Choose a span without missing values.',
      );
    }
    const large = samples.findIndex((x) => Math.abs(x) > largestValue);
    if (large >= 0) {
      throw new AnalysisInputError(
        `Channel '${name}' holds ${samples[large]} at sample ${large} (${large / sampleRateHz} s), which no quantity has. ` +
          'Check the file for damage and the gain, or choose a span without it.',
      );
    }
  }
}
