import { AnalysisInputError } from '../errors.js';
import type { RecordInput, RecordSource } from '../types.js';

/** Refuses a record that cannot be analysed whatever its samples are. */
export function checkRecord({ sampleRateHz, sampleCount, channels }: RecordSource): void {
  if (!(sampleRateHz > 0 && Number.isFinite(sampleRateHz))) {
    throw new AnalysisInputError(`The sample rate must be a positive number of hertz, got ${sampleRateHz}.`);
  }
  channels.forEach(({ index, name }, i) => {
    if (sampleCount < 2) {
      throw new AnalysisInputError(
        `Channel '${name}' holds ${sampleCount} samples; an analysis needs at least 2.`,
      );
    }
    if (channels.findIndex((other) => other.index === index) !== i) {
      throw new AnalysisInputError(`Two channels have the index ${index}; '${name}' is one of them.`);
    }
  });
}

/** The record that samples in memory make; refuses channels of different lengths. */
export function sourceOf({ channels, ...record }: RecordInput): RecordSource {
  const sampleCount = channels[0]?.samples.length ?? 0;
  const other = channels.find(({ samples }) => samples.length !== sampleCount);
  if (other) {
    throw new AnalysisInputError(
      `Channel '${other.name}' holds ${other.samples.length} samples, '${channels[0]!.name}' ${sampleCount}; ` +
        'all channels of a record must be of the same length.',
    );
  }
  const described = channels.map(({ samples: _, ...channel }) => channel);
  return { ...record, sampleCount, channels: described };
}
