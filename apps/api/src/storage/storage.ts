import type { Readable } from 'node:stream';

/** A part of an object: first and last byte, both included, counted from 0. */
export interface ByteRange {
  start: number;
  end: number;
}

/** Bytes that were received whole and wait for their name. */
export interface StagedObject {
  readonly size: number;
  /** SHA-256 of the bytes, 64 lower-case hexadecimal digits. */
  readonly sha256: string;
  /** Puts the bytes under `key`. An object already there is replaced. */
  commit(key: string): Promise<void>;
  /** Drops the bytes; does nothing after `commit`. */
  discard(): Promise<void>;
}

/** An object as a list names it. */
export interface StoredObject {
  key: string;
  /** When its bytes were written, in ms since 1970. */
  writtenAt: number;
}

export type ByteInput = AsyncIterable<Uint8Array> | Uint8Array;

/** Thrown when an object that ought to be there is not. */
export class StorageObjectMissing extends Error {
  constructor(readonly key: string) {
    super(`The stored object ${key} is missing`);
    this.name = 'StorageObjectMissing';
  }
}

/**
 * Where files lie. Keys are relative paths such as `recordings/<id>/channel-0.npy`; see `checkedKey`.
 * An object appears whole or not at all. Reading a missing object fails with `StorageObjectMissing`.
 */
export abstract class Storage {
  /**
   * Makes the store ready and clears what an interrupted process left unnamed a day or more before `now`.
   * @throws Error that says what is wrong when the store cannot be used
   */
  abstract prepare(now?: number): Promise<void>;
  /** Receives bytes without a name yet; what was received of a source that fails is dropped. */
  abstract stage(source: ByteInput): Promise<StagedObject>;
  /**
   * Stages a local file, which is read once. `commit` takes the file over: it is gone afterwards, and no second copy of
   * it was made on a disk. Until then it stays as it is, `discard` leaves it alone.
   */
  abstract stageFile(localPath: string): Promise<StagedObject>;
  abstract put(key: string, source: ByteInput): Promise<{ size: number; sha256: string }>;
  /** Takes over a local file as the object; the file is gone afterwards. */
  abstract putFile(key: string, localPath: string): Promise<void>;
  abstract read(key: string, range?: ByteRange): Promise<Readable>;
  abstract readBytes(key: string, range?: ByteRange): Promise<Uint8Array>;
  abstract size(key: string): Promise<number>;
  /** Deletes the object if it is there. */
  abstract delete(key: string): Promise<void>;
  /** Deletes every object whose key begins with `prefix`, which ends in a slash. */
  abstract deleteAll(prefix: string): Promise<void>;
  /** Every object whose key begins with `prefix`, which ends in a slash, in no order. */
  abstract list(prefix: string): AsyncIterable<StoredObject>;

  async exists(key: string): Promise<boolean> {
    try {
      await this.size(key);
      return true;
    } catch (error) {
      if (error instanceof StorageObjectMissing) return false;
      throw error;
    }
  }
}
