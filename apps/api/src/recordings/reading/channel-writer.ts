import { encodeNpyHeader } from '@overtally/ingest';
import { open, rm, type FileHandle } from 'node:fs/promises';
import { asBytes, putNpy } from '../../storage/npy.js';
import type { Storage } from '../../storage/storage.js';
import { PyramidBuilder } from './pyramid.js';

const bufferedSamples = 8192;

/** Receives the samples of one channel in pieces and leaves them and their pyramid in storage. */
export class ChannelWriter {
  private readonly pyramid = new PyramidBuilder();
  private readonly buffer = new Float64Array(bufferedSamples);
  private buffered = 0;
  private count = 0;

  private constructor(
    private readonly path: string,
    private readonly file: FileHandle,
  ) {}

  /** Begins a file at `path`, with room for the header that is written last. */
  static async open(path: string): Promise<ChannelWriter> {
    const file = await open(path, 'w');
    await file.writeFile(encodeNpyHeader(0));
    return new ChannelWriter(path, file);
  }

  async write(samples: Float64Array): Promise<void> {
    this.pyramid.add(samples);
    this.count += samples.length;
    if (this.buffered + samples.length > bufferedSamples) await this.flush();
    if (samples.length > bufferedSamples) {
      await this.file.writeFile(asBytes(samples));
      return;
    }
    this.buffer.set(samples, this.buffered);
    this.buffered += samples.length;
  }

  /** Completes the file and hands it and the pyramid to storage. */
  async finish(storage: Storage, samplesKey: string, pyramidKey: string): Promise<void> {
    await this.flush();
    await this.file.write(encodeNpyHeader(this.count), 0, undefined, 0);
    await this.file.close();
    await storage.putFile(samplesKey, this.path);
    await putNpy(storage, pyramidKey, this.pyramid.finish());
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
