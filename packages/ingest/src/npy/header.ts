import { refuse } from '../refusal.js';

const MAGIC = [0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59];
/** The longest header the reader looks at; NumPy itself refuses more than 10 000 characters unless told otherwise. */
const MAX_TEXT_BYTES = 1 << 16;
const MAX_CHANNELS = 512;
const CURE_PLAIN =
  "Save a plain array of numbers, for example numpy.save('capture.npy', samples.astype('<f8')), with one column per channel.";
const CURE_CUT = 'Copy or save the file again: it does not hold a whole header.';

/** Type of the stored numbers. */
export interface NpyType {
  kind: 'f' | 'i' | 'u';
  bytes: 1 | 2 | 4 | 8;
  littleEndian: boolean;
  /** As the file writes it, such as `<f8`. */
  written: string;
}

/** What the header of an .npy file says. */
export interface NpyHeader {
  version: string;
  type: NpyType;
  /** Bytes before the first number. */
  dataOffset: number;
  channelCount: number;
  /** Samples per channel. */
  frameCount: number;
  /** True when the samples of a channel lie one after the other, false when those of one instant do. */
  planar: boolean;
  /** What a person should look at. */
  doubts: string[];
}

/** True for the magic string of the format. */
export function isNpy(head: Uint8Array): boolean {
  return MAGIC.every((byte, i) => head[i] === byte);
}

function refuseType(what: string, cure = CURE_PLAIN): never {
  return refuse('unsupported-encoding', `The .npy file holds ${what}, which is not read as a capture.`, cure);
}

function parseType(text: string): NpyType {
  if (/'descr'\s*:\s*[[(]/.test(text)) refuseType('a structured array (records with named fields)');
  const written = /'descr'\s*:\s*'([^']*)'/.exec(text)?.[1];
  if (written === undefined) {
    refuse('bad-header', 'The header of the .npy file names no type ("descr").', CURE_CUT);
  }
  const parts = /^([<>|=]?)([a-zA-Z])(\d*)/.exec(written);
  const [, order = '', kind = '', size = ''] = parts ?? [];
  if (kind === 'O') refuseType('Python objects (a pickled array)');
  if (kind === 'c')
    refuseType('complex numbers', 'Save the real and imaginary parts as two columns of real numbers.');
  if (kind === 'V') refuseType('a structured array (records with named fields)');
  const known = ['f4', 'f8', 'i1', 'i2', 'i4', 'i8', 'u1', 'u2', 'u4'];
  if (written !== `${order}${kind}${size}` || !known.includes(kind + size) || order === '=') {
    refuseType(`numbers of the type "${written.slice(0, 40)}"`);
  }
  return {
    kind: kind as NpyType['kind'],
    bytes: Number(size) as NpyType['bytes'],
    littleEndian: order !== '>',
    written,
  };
}

function parseShape(text: string): number[] {
  const written = /'shape'\s*:\s*\(([^)]*)\)/.exec(text)?.[1];
  if (written === undefined) {
    refuse('bad-header', 'The header of the .npy file names no shape.', CURE_CUT);
  }
  const parts = written.split(',').map((part) => part.trim().replace(/L$/, ''));
  const sizes = parts.filter((part) => part !== '').map(Number);
  if (sizes.some((size) => !Number.isSafeInteger(size) || size < 0)) {
    refuse(
      'bad-header',
      `The header of the .npy file has the shape (${written.slice(0, 80)}), which is none.`,
      CURE_CUT,
    );
  }
  if (sizes.length === 0 || sizes.length > 2) {
    refuse(
      'unsupported-shape',
      `The .npy file holds an array of ${sizes.length} dimensions; a capture has one, or two: samples by channels.`,
      'Save an array of one dimension for one channel, or of two with one column per channel.',
    );
  }
  return sizes;
}

function arrange(
  sizes: number[],
  fortranOrder: boolean,
): Pick<NpyHeader, 'channelCount' | 'frameCount' | 'planar' | 'doubts'> {
  const [rows = 0, columns] = sizes;
  if (columns === undefined) return { channelCount: 1, frameCount: rows, planar: true, doubts: [] };
  const rowsAreSamples = rows >= columns;
  const channelCount = rowsAreSamples ? columns : rows;
  const frameCount = rowsAreSamples ? rows : columns;
  const side = rows === columns ? 'first' : 'longer';
  const doubts =
    channelCount > 1
      ? [
          `The array has ${rows} rows and ${columns} columns; its ${side} side, ${frameCount}, was taken as the samples, the other as ${channelCount} channels.`,
        ]
      : [];
  return { channelCount, frameCount, planar: fortranOrder === rowsAreSamples, doubts };
}

/**
 * Reads the header of an .npy file (NumPy, numpy.lib.format: versions 1.0, 2.0 and 3.0). Refuses what holds no plain
 * real numbers in one or two dimensions.
 * @param bytes the beginning of the file
 * @param complete whether `bytes` is the whole file
 * @returns the header, or the count of bytes needed to get further
 */
export function readNpyHeader(bytes: Uint8Array, complete: boolean): NpyHeader | number {
  const refuseCut = () =>
    refuse('header-cut', 'The .npy header is cut short: the file is incomplete.', CURE_CUT);
  if (bytes.length < 12) return complete ? refuseCut() : 12;
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const [major, minor] = [view.getUint8(6), view.getUint8(7)];
  if (major < 1 || major > 3) {
    refuse(
      'unsupported-encoding',
      `The .npy file has the format version ${major}.${minor}; 1.0, 2.0 and 3.0 are known.`,
      CURE_PLAIN,
    );
  }
  const textOffset = major === 1 ? 10 : 12;
  const textBytes = major === 1 ? view.getUint16(8, true) : view.getUint32(8, true);
  if (textBytes > MAX_TEXT_BYTES) {
    refuse(
      'header-too-long',
      `The .npy header claims ${textBytes} bytes of text; a plain array needs about a hundred.`,
      CURE_PLAIN,
    );
  }
  const dataOffset = textOffset + textBytes;
  if (dataOffset > bytes.length) return complete ? refuseCut() : dataOffset;
  const text = new TextDecoder(major === 3 ? 'utf-8' : 'latin1').decode(
    bytes.subarray(textOffset, dataOffset),
  );
  const type = parseType(text);
  const order = /'fortran_order'\s*:\s*(True|False)/.exec(text)?.[1];
  if (order === undefined) {
    refuse('bad-header', 'The header of the .npy file does not say its order ("fortran_order").', CURE_CUT);
  }
  const layout = arrange(parseShape(text), order === 'True');
  if (layout.channelCount > MAX_CHANNELS) {
    refuse(
      'too-many-channels',
      `The shorter side of the array is ${layout.channelCount}; up to ${MAX_CHANNELS} channels are read at a time.`,
      `Save up to ${MAX_CHANNELS} channels to a file.`,
    );
  }
  return { version: `${major}.${minor}`, type, dataOffset, ...layout };
}
