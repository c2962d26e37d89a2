import { refuse } from '../refusal.js';
import { readInfoList } from './info-list.js';
import { readFormat, type WavFormat } from './format-chunk.js';

const UNKNOWN_SIZE = 0xffffffff;
const CURE_CUT = 'Copy the file from the recorder again, or repair it with the software of the recorder.';

/** A WAV file up to its samples. */
export interface WavHeader {
  format: WavFormat;
  /** Offset of the first sample byte. */
  dataOffset: number;
  /** Bytes of samples that the header claims; null: to the end of the file. */
  dataBytes: number | null;
  /** The data chunk says 0 bytes but is followed by something that is no chunk. */
  sizeWasZero: boolean;
  metadata: Record<string, string>;
}

/** True when the bytes begin like a WAV file: RIFF or RF64 (EBU Tech 3306, ITU-R BS.2088) of type WAVE. */
export function isWav(head: Uint8Array): boolean {
  const id = fourCc(head, 0);
  if (id !== 'RIFF' && id !== 'RF64' && id !== 'BW64') return false;
  return head.length < 12 || fourCc(head, 8) === 'WAVE';
}

export function fourCc(bytes: Uint8Array, offset: number): string {
  return String.fromCharCode(...bytes.subarray(offset, offset + 4));
}

/** True when a chunk of a known kind, or one that looks like a chunk, begins at `offset`. */
function looksLikeChunk(bytes: Uint8Array, offset: number): boolean {
  return offset >= bytes.length || /^[A-Za-z][A-Za-z0-9_]{2}[A-Za-z0-9_ ]$/.test(fourCc(bytes, offset));
}

interface Walk {
  format: WavFormat | null;
  ds64DataBytes: number | null;
  metadata: Record<string, string>;
}

function visit(id: string, body: Uint8Array, walk: Walk): void {
  if (id === 'fmt ') walk.format = readFormat(body);
  if (id === 'LIST') Object.assign(walk.metadata, readInfoList(body));
  if (id === 'ds64' && body.length >= 16) {
    const view = new DataView(body.buffer, body.byteOffset, body.byteLength);
    walk.ds64DataBytes = Number(view.getBigUint64(8, true));
  }
}

function atData(bytes: Uint8Array, size: number, offset: number, walk: Walk): WavHeader {
  if (walk.format === null) {
    refuse(
      'no-format-chunk',
      'The WAV file has no format chunk ("fmt ") before its samples, so their format is unknown.',
      CURE_CUT,
    );
  }
  const sizeWasZero = size === 0 && !looksLikeChunk(bytes, offset);
  const unknown = size === UNKNOWN_SIZE || sizeWasZero;
  const dataBytes = unknown ? (size === UNKNOWN_SIZE ? walk.ds64DataBytes : null) : size;
  return { format: walk.format, dataOffset: offset, dataBytes, sizeWasZero, metadata: walk.metadata };
}

function refuseEnd(walk: Walk, bytes: Uint8Array): never {
  if (bytes.length < 12)
    refuse('header-cut', 'The WAV header is cut short: the file is incomplete.', CURE_CUT);
  if (walk.format !== null) {
    refuse('no-data-chunk', 'The WAV file has no data chunk: there are no samples in it.', CURE_CUT);
  }
  refuse('no-format-chunk', 'The WAV header is cut short or has no format chunk ("fmt ").', CURE_CUT);
}

/**
 * Walks the chunks of a WAV file up to its samples (RIFF/WAVE: IBM and Microsoft, Multimedia Programming Interface and
 * Data Specifications 1.0, 1991).
 * @param bytes the beginning of the file
 * @param complete whether `bytes` is the whole file
 * @returns the header, or the count of bytes needed to get further
 */
export function readWavHeader(bytes: Uint8Array, complete: boolean): WavHeader | number {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const walk: Walk = { format: null, ds64DataBytes: null, metadata: {} };
  let offset = 12;
  for (;;) {
    if (offset + 8 > bytes.length) return complete ? refuseEnd(walk, bytes) : offset + 8;
    const id = fourCc(bytes, offset);
    const size = view.getUint32(offset + 4, true);
    const start = offset + 8;
    if (id === 'data') {
      if (size === 0 && start + 8 > bytes.length && !complete) return start + 8;
      return atData(bytes, size, start, walk);
    }
    // Chunks begin on even offsets: an odd-sized one is followed by a pad byte.
    const end = start + size + (size % 2);
    if (end > bytes.length && !complete) return end;
    if (start + size > bytes.length) refuseEnd(walk, bytes);
    visit(id, bytes.subarray(start, start + size), walk);
    offset = end;
  }
}
