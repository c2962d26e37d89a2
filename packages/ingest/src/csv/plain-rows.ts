import type { ReadChannel } from '../types.js';
import { createKernel, type Kernel } from '../wasm/kernel.js';
import type { CsvLayout } from './layout.js';

/** Bytes that are handed to the kernel at once. */
const PIECE_BYTES = 1 << 18;
/** Zeros behind the bytes, at which the kernel stops without asking for the end at each step. */
const STOP_BYTES = 16;
/** Fields of the plan in assembly/rows.ts, as indices of 32-bit words; `RISEN` of 64-bit ones. */
const NEXT = 4;
const TAIL_LOW = 5;
const TAIL_HIGH = 6;
const RISEN = 4;
const ADDRESSES = 10;

/**
 * Rows that hold a plain number in each wanted cell and nothing unusual beside, read many at a time by the compiled
 * kernel; whatever else stands in a table is left to `RowParser`. The values are the same to the last bit.
 */
export class PlainRows {
  /** Values of each channel, row by row. */
  readonly blocks: Float64Array[];
  /** Values of the time column. */
  readonly stamps: Float64Array;
  private readonly planAddress: number;
  private readonly integers: Int32Array;
  private readonly floats: Float64Array;
  private readonly room: Uint8Array;
  private bytes: Uint8Array | null = null;
  /** The part of `bytes` that lies in the memory of the kernel. */
  private pieceFrom = 0;
  private pieceEnd = 0;

  private constructor(
    private readonly kernel: Kernel,
    layout: CsvLayout,
    channels: ReadChannel[],
    private readonly capacity: number,
  ) {
    const { dialect, columns, time } = layout;
    const { buffer } = kernel;
    this.room = new Uint8Array(buffer, kernel.allocate(PIECE_BYTES + STOP_BYTES), PIECE_BYTES + STOP_BYTES);
    this.planAddress = kernel.allocate(planBytes(layout));
    this.integers = new Int32Array(buffer, this.planAddress, ADDRESSES + columns.length);
    this.floats = new Float64Array(buffer, this.planAddress, RISEN + 1);
    const values = () => new Float64Array(buffer, kernel.allocate(8 * capacity), capacity);
    this.stamps = values();
    this.blocks = channels.map(values);
    this.integers.set([
      dialect.delimiter.charCodeAt(0),
      dialect.decimal.charCodeAt(0),
      columns.length,
      time?.column ?? -1,
    ]);
    for (const { index } of columns) {
      const channel = channels.findIndex(({ column }) => column === index);
      const target = index === time?.column ? this.stamps : this.blocks[channel];
      this.integers[ADDRESSES + index] = target?.byteOffset ?? 0;
    }
  }

  /** Null where there is no kernel, or a table that it does not serve. `capacity`: rows in a block. */
  static create(layout: CsvLayout, channels: ReadChannel[], capacity: number): PlainRows | null {
    const { time } = layout;
    const wanted = [...channels.map(({ column }) => column), ...(time === null ? [] : [time.column])];
    const stamped = time !== null && time.unit === null;
    if (stamped || new Set(wanted).size < wanted.length) return null;
    const blocks = Array.from({ length: channels.length + 1 }, () => 8 * capacity);
    const kernel = createKernel([PIECE_BYTES + STOP_BYTES, planBytes(layout), ...blocks]);
    return kernel && new PlainRows(kernel, layout, channels, capacity);
  }

  /** The bytes that `read` speaks of. */
  begin(bytes: Uint8Array): void {
    this.bytes = bytes;
    this.pieceEnd = 0;
  }

  /** Offset of the byte after the rows that were read last. */
  get next(): number {
    return this.integers[NEXT]! - this.room.byteOffset + this.pieceFrom;
  }

  /** Fewest and most digits at the end of the rows that were read last, see `NumberScanner.tail`. */
  get tails(): [number, number] {
    return [this.integers[TAIL_LOW]!, this.integers[TAIL_HIGH]!];
  }

  /**
   * Reads the rows at `from`, as long as they are plain and their time rises above `risen`, into the blocks from row
   * `filled` on; returns how many.
   */
  read(from: number, end: number, filled: number, risen: number): number {
    if (from >= this.pieceEnd) this.load(from, end);
    const { integers, kernel, room } = this;
    integers[TAIL_LOW] = 2 ** 31 - 1;
    integers[TAIL_HIGH] = -1;
    this.floats[RISEN] = risen;
    const at = room.byteOffset + from - this.pieceFrom;
    const until = room.byteOffset + this.pieceEnd - this.pieceFrom;
    const count = kernel.functions.parseRows(this.planAddress, at, until, filled, this.capacity) - filled;
    if (count > 0 || this.pieceEnd === end || from === this.pieceFrom) return count;
    // The row goes on behind the piece.
    this.load(from, end);
    return this.read(from, end, filled, risen);
  }

  private load(from: number, end: number): void {
    this.pieceFrom = from;
    this.pieceEnd = Math.min(end, from + PIECE_BYTES);
    this.room.set(this.bytes!.subarray(from, this.pieceEnd));
    this.room.fill(0, this.pieceEnd - from, this.pieceEnd - from + STOP_BYTES);
  }
}

const planBytes = ({ columns }: CsvLayout) => 4 * (ADDRESSES + columns.length);
