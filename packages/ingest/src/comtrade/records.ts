/** Decodes records into blocks of stamps and values. Which columns are wanted is known from the beginning. */
export interface RecordReader {
  /** Time stamps of the block, NaN where one is missing. */
  readonly stamps: Float64Array;
  /** Stored numbers of the block per wanted column, NaN where one is missing. */
  readonly values: Float64Array[];
  /** Records in the block. */
  count: number;
  /** True when the data end within a record, which is dropped. */
  cut: boolean;
  /**
   * Decodes whole records of `bytes` into the block; `last`: nothing follows them.
   * @returns bytes used; 0 when no whole record is there
   */
  read(bytes: Uint8Array, last: boolean): number;
}

/** Most bytes that are handed to a reader at a time. */
export const WINDOW_BYTES = 1 << 17;
