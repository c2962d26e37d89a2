import type { ComtradeConfig } from './config.js';
import { type RecordReader, WINDOW_BYTES } from './records.js';

const MISSING_STAMP = 0xffffffff;

type ReadValue = (view: DataView, offset: number) => number;

/** The lowest code stands for a missing value. */
const VALUES: Record<'binary' | 'binary32' | 'float32', { bytes: number; read: ReadValue; missing: number }> =
  {
    binary: { bytes: 2, read: (view, p) => view.getInt16(p, true), missing: -0x8000 },
    binary32: { bytes: 4, read: (view, p) => view.getInt32(p, true), missing: -0x80000000 },
    float32: { bytes: 4, read: (view, p) => view.getFloat32(p, true), missing: NaN },
  };

/**
 * Records of binary data: sample number and time stamp as 32-bit integers, the analog values, then status bits in words
 * of 16; little-endian throughout (IEEE C37.111, clause on binary data files).
 */
export class BinaryRecords implements RecordReader {
  readonly stamps: Float64Array;
  readonly values: Float64Array[];
  readonly recordBytes: number;
  count = 0;
  cut = false;
  private readonly format: (typeof VALUES)['binary'];

  constructor(
    config: ComtradeConfig,
    encoding: keyof typeof VALUES,
    private readonly columns: number[],
  ) {
    this.format = VALUES[encoding];
    this.recordBytes = 8 + this.format.bytes * config.analog.length + 2 * Math.ceil(config.statusCount / 16);
    const capacity = Math.max(1, Math.ceil(WINDOW_BYTES / this.recordBytes));
    this.stamps = new Float64Array(capacity);
    this.values = columns.map(() => new Float64Array(capacity));
  }

  read(bytes: Uint8Array, last: boolean): number {
    const { recordBytes, format, stamps, columns } = this;
    const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
    this.count = Math.min(Math.floor(bytes.length / recordBytes), stamps.length);
    for (let i = 0; i < this.count; i += 1) {
      const stamp = view.getUint32(i * recordBytes + 4, true);
      stamps[i] = stamp === MISSING_STAMP ? NaN : stamp;
    }
    for (const [k, column] of columns.entries()) {
      const out = this.values[k] as Float64Array;
      for (let i = 0, p = 8 + format.bytes * column; i < this.count; i += 1, p += recordBytes) {
        const value = format.read(view, p);
        out[i] = value === format.missing || !Number.isFinite(value) ? NaN : value;
      }
    }
    if (this.count === 0 && last && bytes.length > 0) this.cut = true;
    return this.count * recordBytes;
  }
}
