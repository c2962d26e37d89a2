import type { MissingTally } from '../frames.js';
import type { ReadWarning } from '../types.js';
import type { WavHeader } from './header.js';

/** What was found among the samples. */
export interface Counts {
  frames: number;
  /** Bytes of a last frame that is not whole. */
  leftover: number;
  missing: MissingTally;
}

/** Warnings about the samples of a WAV file that are missing or were not announced. */
export function collectWarnings(header: WavHeader, counts: Counts): ReadWarning[] {
  const { frames, leftover, missing } = counts;
  const { format, dataBytes } = header;
  const claimed =
    dataBytes === null ? null : Math.floor(dataBytes / (format.bytesPerSample * format.channelCount));
  const found: ReadWarning[] = [];
  if (claimed !== null && frames < claimed) {
    const message = `The header claims ${claimed} samples per channel but the file ends after ${frames}; what is there was read.`;
    found.push({ code: 'truncated', message, count: 1, samples: [frames] });
  } else if (leftover > 0) {
    found.push({
      code: 'truncated',
      message: 'The last frame of samples is not whole and was dropped.',
      count: 1,
      samples: [frames],
    });
  }
  if (header.sizeWasZero) {
    found.push({
      code: 'data-size-zero',
      message: 'The header says 0 bytes of samples; the file was read to its end.',
    });
  } else if (dataBytes === null) {
    found.push({
      code: 'data-size-unknown',
      message: 'The header does not state how many samples there are; the file was read to its end.',
    });
  }
  found.push(...missing.warnings());
  return found;
}
