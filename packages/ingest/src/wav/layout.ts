import { checkSampleRateOption, selectChannels } from '../channels.js';
import type { DetectedLayout, ImportOptions, LayoutColumn, ReadChannel } from '../types.js';
import type { WavHeader } from './header.js';
import { codeRange } from './samples.js';

/** Columns of a WAV file: its channels, named ch1, ch2 … */
function wavColumns(header: WavHeader): LayoutColumn[] {
  return Array.from({ length: header.format.channelCount }, (_, index) => ({
    index,
    name: `ch${index + 1}`,
    unit: '',
    quantity: 'dimensionless' as const,
  }));
}

export function describeWav(header: WavHeader): DetectedLayout {
  const { encoding, bytesPerSample } = header.format;
  return {
    format: 'wav',
    columns: wavColumns(header),
    bitsPerSample: bytesPerSample * 8,
    sampleFormat: encoding,
    confident: true,
    doubts: [],
  };
}

/** Channels of a WAV file as the options have them. */
export function wavChannels(header: WavHeader, options: ImportOptions): ReadChannel[] {
  checkSampleRateOption(options);
  const columns = wavColumns(header);
  return selectChannels(
    options,
    columns,
    [],
    columns.map(({ index }) => index),
    () => codeRange(header.format),
  );
}
