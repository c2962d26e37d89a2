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

/** Raw values of the lowest and highest code of an integer format, null for floats. */
export function codeRange(format: WavFormat): { lowest: number; highest: number } | null {
  return format.encoding === 'float' ? null : { lowest: -1, highest: 1 - 2 ** (1 - format.validBits) };
}
