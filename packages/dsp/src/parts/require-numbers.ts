import { AnalysisInputError } from '../errors.js';

/** Beyond it, the squares of a long record and of its spectrum would no longer be finite numbers. */
const LARGEST_VALUE = 1e100;

/**
 * Refuses what no analysis can use, naming the channel and the sample.
 *
 * @param from position of the block in its record
 * @throws AnalysisInputError for a value that is no finite number, or larger than 1e100
 */
export function requireNumbers(block: Float64Array, from: number, name: string, sampleRateHz: number): void {
  let sum = 0;
  let largest = 0;
  for (let i = 0; i < block.length; i++) {
    const size = Math.abs(block[i]!);
    sum += size;
    if (size > largest) largest = size;
  }
  if (Number.isFinite(sum) && largest <= LARGEST_VALUE) return;
  const where = (i: number) => `at sample ${from + i} (${(from + i) / sampleRateHz} s)`;
  const bad = block.findIndex((x) => !Number.isFinite(x));
  if (bad >= 0) {
    throw new AnalysisInputError(
      `Channel '${name}' has no number ${where(bad)}. Choose a span without missing values.`,
    );
  }
  const large = block.findIndex((x) => Math.abs(x) > LARGEST_VALUE);
  throw new AnalysisInputError(
    `Channel '${name}' holds ${block[large]} ${where(large)}, which no quantity has. ` +
      'Check the file for damage and the gain, or choose a span without it.',
  );
}
