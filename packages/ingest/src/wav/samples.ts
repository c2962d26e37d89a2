import { createKernel, type Kernel } from '../wasm/kernel.js';
import type { WavFormat } from './format-chunk.js';

type Decoder = (bytes: Uint8Array, from: number, stride: number, frames: number, out: Float64Array) => void;

const decode8: Decoder = (bytes, from, stride, frames, out) => {
  for (let i = 0, p = from; i < frames; i += 1, p += stride) out[i] = ((bytes[p] as number) - 128) / 128;
};

const decode16: Decoder = (bytes, from, stride, frames, out) => {
  for (let i = 0, p = from; i < frames; i += 1, p += stride) {
    out[i] = (((bytes[p] as number) << 16) | ((bytes[p + 1] as number) << 24)) / 2147483648;
  }
};

const decode24: Decoder = (bytes, from, stride, frames, out) => {
  for (let i = 0, p = from; i < frames; i += 1, p += stride) {
    const code =
      ((bytes[p] as number) << 8) | ((bytes[p + 1] as number) << 16) | ((bytes[p + 2] as number) << 24);
    out[i] = code / 2147483648;
  }
};

function viewOf(bytes: Uint8Array): DataView {
  return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
}

const decode32: Decoder = (bytes, from, stride, frames, out) => {
  const view = viewOf(bytes);
  for (let i = 0, p = from; i < frames; i += 1, p += stride) out[i] = view.getInt32(p, true) / 2147483648;
};

const decodeFloat32: Decoder = (bytes, from, stride, frames, out) => {
  const view = viewOf(bytes);
  for (let i = 0, p = from; i < frames; i += 1, p += stride) out[i] = view.getFloat32(p, true);
};

const decodeFloat64: Decoder = (bytes, from, stride, frames, out) => {
  const view = viewOf(bytes);
  for (let i = 0, p = from; i < frames; i += 1, p += stride) out[i] = view.getFloat64(p, true);
};

const PCM: (Decoder | undefined)[] = [undefined, decode8, decode16, decode24, decode32];

/**
 * Decoder of a sample format. Integer codes become code / 2^(container bits - 1), bytes (byte - 128) / 128; floats stay
 * as they are. `from` is the offset of the first sample, `stride` the bytes from one frame to the next.
 */
export function decoderOf(format: WavFormat): Decoder {
  if (format.encoding === 'float') return format.bytesPerSample === 4 ? decodeFloat32 : decodeFloat64;
  const decoder = PCM[format.bytesPerSample];
  if (decoder === undefined) throw new RangeError(`no decoder for ${format.bytesPerSample} bytes per sample`);
  return decoder;
}

/** Turns blocks of interleaved frames into samples, one channel at a time. */
export interface FrameDecoder {
  /** The frames that `decode` speaks of: whole ones, no more than the decoder was made for. */
  begin(bytes: Uint8Array): void;
  /** Samples of the channel in position `column` of each frame. They stand until the next call. */
  decode(column: number): Float64Array;
}

/** Decodes up to `mostFrames` frames at once; integer codes by the compiled kernel where it runs. */
export function frameDecoder(format: WavFormat, mostFrames: number): FrameDecoder {
  const stride = format.bytesPerSample * format.channelCount;
  const rooms = [stride * mostFrames, 8 * mostFrames];
  const kernel = format.encoding === 'float' ? null : createKernel(rooms);
  return kernel === null ? plainDecoder(format, mostFrames) : kernelDecoder(kernel, format, rooms);
}

function plainDecoder(format: WavFormat, mostFrames: number): FrameDecoder {
  const stride = format.bytesPerSample * format.channelCount;
  const decode = decoderOf(format);
  const out = new Float64Array(mostFrames);
  let frames: Uint8Array = new Uint8Array(0);
  return {
    begin: (bytes) => (frames = bytes),
    decode: (column) => {
      const samples = out.subarray(0, frames.length / stride);
      decode(frames, column * format.bytesPerSample, stride, samples.length, samples);
      return samples;
    },
  };
}

function kernelDecoder(kernel: Kernel, format: WavFormat, [inBytes, outBytes]: number[]): FrameDecoder {
  const { bytesPerSample, channelCount } = format;
  const { decode8, decode16, decode24, decode32 } = kernel.functions;
  const decode = [decode8, decode16, decode24, decode32][bytesPerSample - 1]!;
  const stride = bytesPerSample * channelCount;
  const [from, to] = [kernel.allocate(inBytes!), kernel.allocate(outBytes!)];
  const room = new Uint8Array(kernel.buffer, from, inBytes);
  const out = new Float64Array(kernel.buffer, to, outBytes! / 8);
  let count = 0;
  return {
    begin: (bytes) => {
      room.set(bytes);
      count = bytes.length / stride;
    },
    decode: (column) => {
      decode(from + column * bytesPerSample, stride, count, to);
      return out.subarray(0, count);
    },
  };
}

/** Raw values of the lowest and highest code of an integer format, null for floats. */
export function codeRange(format: WavFormat): { lowest: number; highest: number } | null {
  return format.encoding === 'float' ? null : { lowest: -1, highest: 1 - 2 ** (1 - format.validBits) };
}
