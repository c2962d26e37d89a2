import { refuse } from '../refusal.js';

const PCM = 1;
const FLOAT = 3;
const EXTENSIBLE = 0xfffe;
const MAX_CHANNELS = 1024;
const SUBTYPE_TAIL = [0, 0, 0, 0, 0x10, 0, 0x80, 0, 0, 0xaa, 0, 0x38, 0x9b, 0x71];
const CODECS: Record<number, string> = {
  0x02: 'Microsoft ADPCM',
  0x06: 'A-law',
  0x07: 'mu-law',
  0x11: 'IMA ADPCM',
  0x50: 'MPEG',
  0x55: 'MP3',
  0xff: 'AAC',
  0x161: 'Windows Media Audio',
};

/** Sample format of a WAV file. */
export interface WavFormat {
  encoding: 'pcm' | 'float';
  channelCount: number;
  sampleRateHz: number;
  /** Bytes that one sample takes in the file. */
  bytesPerSample: number;
  /** Bits that carry information; the rest of an integer sample is padding below them. */
  validBits: number;
}

const CURE_FORMAT = 'Save the recording as WAV with PCM or float samples.';

function readTag(chunk: Uint8Array, view: DataView): number {
  const tag = view.getUint16(0, true);
  if (tag !== EXTENSIBLE) return tag;
  if (chunk.length < 40) {
    refuse('bad-format-chunk', 'The extensible format chunk of the WAV file is cut short.', CURE_FORMAT);
  }
  const isStandard = SUBTYPE_TAIL.every((byte, i) => chunk[26 + i] === byte);
  return isStandard ? view.getUint16(24, true) : EXTENSIBLE;
}

function checkEncoding(tag: number): 'pcm' | 'float' {
  if (tag === PCM) return 'pcm';
  if (tag === FLOAT) return 'float';
  const name = CODECS[tag] ?? `format tag 0x${tag.toString(16).padStart(4, '0')}`;
  return refuse(
    'unsupported-encoding',
    `The WAV file is in a compressed or unknown format (${name}); only PCM and IEEE float samples are read.`,
    CURE_FORMAT,
  );
}

function checkCounts(channelCount: number, sampleRateHz: number): void {
  if (channelCount === 0)
    refuse('no-channels', 'The format chunk of the WAV file says 0 channels.', CURE_FORMAT);
  if (channelCount > MAX_CHANNELS) {
    const message = `The format chunk of the WAV file says ${channelCount} channels; up to ${MAX_CHANNELS} are read.`;
    refuse('too-many-channels', message, 'Split the recording into files of fewer channels.');
  }
  if (sampleRateHz === 0) {
    refuse('bad-sample-rate', 'The format chunk of the WAV file says a sample rate of 0 Hz.', CURE_FORMAT);
  }
}

/**
 * Reads a format chunk: WAVEFORMAT, WAVEFORMATEX or WAVE_FORMAT_EXTENSIBLE. Samples narrower than their container are
 * left-justified in it, as both specifications have it. Refuses what is not PCM of 8 to 32 bits or float of 32 or 64.
 */
export function readFormat(chunk: Uint8Array): WavFormat {
  if (chunk.length < 16) {
    refuse('bad-format-chunk', 'The format chunk ("fmt ") of the WAV file is cut short.', CURE_FORMAT);
  }
  const view = new DataView(chunk.buffer, chunk.byteOffset, chunk.byteLength);
  const encoding = checkEncoding(readTag(chunk, view));
  const channelCount = view.getUint16(2, true);
  const sampleRateHz = view.getUint32(4, true);
  checkCounts(channelCount, sampleRateHz);
  const bits = view.getUint16(14, true);
  const blockAlign = view.getUint16(12, true);
  const bytesPerSample = blockAlign === 0 ? Math.ceil(bits / 8) : blockAlign / channelCount;
  const allowed = encoding === 'pcm' ? [1, 2, 3, 4] : [4, 8];
  const fits = encoding === 'pcm' ? bits >= 1 && bits <= bytesPerSample * 8 : bits === bytesPerSample * 8;
  if (!allowed.includes(bytesPerSample) || !fits) {
    refuse(
      'bad-format-chunk',
      `The format chunk of the WAV file is not usable: ${bits} bits per sample in blocks of ${blockAlign} bytes for ${channelCount} channels.`,
      CURE_FORMAT,
    );
  }
  const stated = view.getUint16(0, true) === EXTENSIBLE ? view.getUint16(18, true) : bits;
  const validBits = stated >= 1 && stated <= bytesPerSample * 8 ? stated : bits;
  return { encoding, channelCount, sampleRateHz, bytesPerSample, validBits };
}
