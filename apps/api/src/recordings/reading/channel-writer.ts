import type { Storage } from '../../storage/storage.js';
import { NpyFile } from './npy-file.js';
import { PyramidBuilder } from './pyramid.js';

/** Receives the samples of one channel in pieces and leaves them and their pyramid in storage. */
export class ChannelWriter {
  private readonly builder = new PyramidBuilder();

  private constructor(
    private readonly samples: NpyFile,
    private readonly pyramid: NpyFile,
  ) {}

  /** Begins the files of a channel, whose names begin with `path`. */
  static async open(path: string): Promise<ChannelWriter> {
    const samples = await NpyFile.open(`${path}.npy`);
    return new ChannelWriter(samples, await NpyFile.open(`${path}-pyramid.npy`));
  }

  async write(samples: Float64Array): Promise<void> {
    await this.pyramid.append(this.builder.add(samples));
    await this.samples.append(samples);
  }

  /** Completes the files and hands them to storage. */
  async finish(storage: Storage, samplesKey: string, pyramidKey: string): Promise<void> {
    await this.samples.finish();
    await storage.putFile(samplesKey, this.samples.path);
    for (const level of this.builder.finish()) await this.pyramid.append(level);
    await this.pyramid.finish();
    await storage.putFile(pyramidKey, this.pyramid.path);
  }

  /** Removes what was written so far. */
  async discard(): Promise<void> {
    await this.samples.discard();
    await this.pyramid.discard();
  }
}
