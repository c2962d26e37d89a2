import { checkSampleRateOption, selectChannels } from '../channels.js';
import { refuse } from '../refusal.js';
import type { DetectedLayout, ImportOptions, LayoutColumn, ReadChannel } from '../types.js';
import type { NpyHeader } from './header.js';
import { codeRange } from './samples.js';

/** Channels of the array, named ch1, ch2 …; the format has no names or units. */
function npyColumns({ channelCount }: NpyHeader): LayoutColumn[] {
  return Array.from({ length: channelCount }, (_, index) => ({
    index,
    name: `ch${index + 1}`,
    unit: '',
    quantity: 'other' as const,
  }));
}

/** Describes the array in the words of the public interface. */
export function describeNpy(header: NpyHeader): DetectedLayout {
  const { type, doubts } = header;
  return {
    format: 'npy',
    columns: npyColumns(header),
    bitsPerSample: type.bytes * 8,
    sampleFormat: type.written,
    confident: doubts.length === 0,
    doubts,
  };
}

/** Channels of the array as the options have them. */
export function npyChannels(header: NpyHeader, options: ImportOptions): ReadChannel[] {
  checkSampleRateOption(options);
  const columns = npyColumns(header);
  const all = columns.map(({ index }) => index);
  const range = codeRange(header.type);
  return selectChannels(options, columns, [], all, () => range);
}

/** The sample rate the user gives. Refuses without one, since the format has no place for it. */
export function npySampleRateHz(options: ImportOptions): number {
  return (
    options.sampleRateHz ??
    refuse(
      'needs-sample-rate',
      'The file states no sample rate: the .npy format has no place for one.',
      'Give the sample rate in hertz.',
    )
  );
}
