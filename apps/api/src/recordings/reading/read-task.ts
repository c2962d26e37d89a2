import type { ImportOptions, ReadProblem } from '@overtally/contracts';
import { readRecording, type ReadChannel, type ReadSuccess, type SampleSink } from '@overtally/ingest';
import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import { ComputeStopped, type ComputeContext } from '../../jobs/compute-task.js';
import { ChannelWriter } from './channel-writer.js';

export interface ReadTaskInput {
  sourceKey: string;
  fileName: string;
  sizeBytes: number;
  options: ImportOptions;
  /** Prefix of the keys under which the samples are stored. */
  outputPrefix: string;
}

export type StoredChannel = ReadChannel & { missingValues: number; samplesKey: string; pyramidKey: string };

export type ReadTaskResult =
  | (Omit<ReadSuccess, 'channels' | 'missingValues'> & { channels: StoredChannel[] })
  | { ok: false; problem: ReadProblem };

/** Reads a source file from storage and stores its samples; a file that cannot be read is a result, not an error. */
export async function readTask(input: ReadTaskInput, context: ComputeContext): Promise<ReadTaskResult> {
  const stop = new AbortController();
  const sink = new StoringSink(context, () => stop.abort(new ComputeStopped()));
  try {
    const outcome = await readRecording(() => context.storage.read(input.sourceKey), {
      fileName: input.fileName,
      sizeBytes: input.sizeBytes,
      options: input.options,
      sink,
      onProgress: (bytesRead) => context.reportProgress(bytesRead / Math.max(1, input.sizeBytes)),
      signal: stop.signal,
    });
    if (!outcome.ok) {
      await sink.discard();
      return outcome;
    }
    const { missingValues, ...rest } = outcome;
    const keys = await sink.finish(input.outputPrefix);
    const channels = outcome.channels.map((channel, i) => ({
      ...channel,
      ...keys[i]!,
      missingValues: missingValues[i] ?? 0,
    }));
    return { ...rest, channels };
  } catch (error) {
    await sink.discard();
    throw error;
  }
}

/** Writes each channel to a file of its own. */
class StoringSink implements SampleSink {
  private writers: ChannelWriter[] = [];
  private readonly folderName = randomUUID();

  constructor(
    private readonly context: ComputeContext,
    private readonly stop: () => void,
  ) {}

  async begin(channels: ReadChannel[]): Promise<void> {
    await this.discard();
    for (const { index } of channels) {
      const path = join(this.context.scratchFolder, `${this.folderName}-${index}`);
      this.writers.push(await ChannelWriter.open(path));
    }
  }

  async write(channelIndex: number, samples: Float64Array): Promise<void> {
    if (this.context.shouldStop()) this.stop();
    const writer = this.writers[channelIndex];
    if (writer === undefined)
      throw new RangeError(`Samples for a channel that was not begun: ${channelIndex}`);
    await writer.write(samples);
  }

  async finish(prefix: string): Promise<{ samplesKey: string; pyramidKey: string }[]> {
    const keys = this.writers.map((_, i) => ({
      samplesKey: `${prefix}/channel-${i}.npy`,
      pyramidKey: `${prefix}/channel-${i}-pyramid.npy`,
    }));
    for (const { samplesKey, pyramidKey } of keys) {
      await this.writers[0]!.finish(this.context.storage, samplesKey, pyramidKey);
      this.writers.shift();
    }
    return keys;
  }

  async discard(): Promise<void> {
    for (const writer of this.writers.splice(0)) await writer.discard();
  }
}
