import { encodeNpyHeader } from '@overtally/ingest';
import { open, rm, type FileHandle } from 'node:fs/promises';
import { asBytes } from '../../storage/npy.js';

const bufferedValues = 8192;

/** A one-dimensional .npy file of little-endian float64 that grows until it is finished. */
export class NpyFile {
  private readonly buffer = new Float64Array(bufferedValues);
  private buffered = 0;
  private count = 0;

  private constructor(
    readonly path: string,
    private readonly file: FileHandle,
  ) {}

  /** Begins a file at `path`, with room for the header that is written last. */
  static async open(path: string): Promise<NpyFile> {
    const file = await open(path, 'w');
    await file.writeFile(encodeNpyHeader(0));
    return new NpyFile(path, file);
  }

  async append(values: Float64Array): Promise<void> {
    this.count += values.length;
    if (this.buffered + values.length > bufferedValues) await this.flush();
    if (values.length > bufferedValues) {
      await this.file.writeFile(asBytes(values));
      return;
    }
    this.buffer.set(values, this.buffered);
    this.buffered += values.length;
  }

  /** Completes and closes the file. */
  async finish(): Promise<void> {
    await this.flush();
    await this.file.write(encodeNpyHeader(this.count), 0, undefined, 0);
    await this.file.close();
  }

  /** Removes what was written so far. */
  async discard(): Promise<void> {
    await this.file.close();
    await rm(this.path, { force: true });
  }

  private async flush(): Promise<void> {
    if (this.buffered === 0) return;
    await this.file.writeFile(asBytes(this.buffer.subarray(0, this.buffered)));
    this.buffered = 0;
  }
}
