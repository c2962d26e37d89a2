import { AnalysisInputError } from '../errors.js';

/** Beyond it, the squares of a long record and of its spectrum would no longer be finite numbers. */
export const LARGEST_VALUE = 1e100;

/**
 * The refusal of a block that holds a value which is no finite number or larger than 1e100, naming the channel and the
 * sample.
 *
 * @param from position of the block in its record
 */
export function refuseValues(
  block: Float64Array,
  from: number,
  name: string,
  sampleRateHz: number,
): AnalysisInputError {
  const where = (i: number) => `at sample ${from + i} (${(from + i) / sampleRateHz} s)`;
  const bad = block.findIndex((x) => !Number.isFinite(x));
  if (bad >= 0) {
    return new AnalysisInputError(
      `Channel '${name}' has no number ${where(bad)}. Choose a span without missing values.`,
    );
  }
  const large = block.findIndex((x) => Math.abs(x) > LARGEST_VALUE);
  return new AnalysisInputError(
    `Channel '${name}' holds ${block[large]} ${where(large)}, which no quantity has. ` +
      'Check the file for damage and the gain, or choose a span without it.',
  );
}
