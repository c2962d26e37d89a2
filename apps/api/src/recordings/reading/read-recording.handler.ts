import { Inject, Injectable } from '@nestjs/common';
import type { ReadProblem } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { dirname } from 'node:path/posix';
import type { z } from 'zod';
import { DATABASE } from '../../database/database.tokens.js';
import { ComputePool } from '../../jobs/compute-pool.js';
import { isComputeStopped } from '../../jobs/compute-task.js';
import { readRecordingJob } from '../../jobs/definitions/read-recording.job.js';
import type { JobContext, JobHandler } from '../../jobs/job-handler.js';
import { watched } from '../../jobs/watched-compute.js';
import { Storage } from '../../storage/storage.js';
import { AnalysisRunsService } from '../analysis-runs.service.js';
import { readPrefix } from '../recording-keys.js';
import { RecordingsRepository, type RecordingRow } from '../recordings.repository.js';
import type { ReadTaskInput, ReadTaskResult } from './read-task.js';

type Payload = z.infer<typeof readRecordingJob.payload>;
type ReadOk = Extract<ReadTaskResult, { ok: true }>;

/** Reads a recording's source into samples, then queues the analysis under the project's settings. */
@Injectable()
export class ReadRecordingHandler implements JobHandler<Payload> {
  readonly definition = readRecordingJob;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: RecordingsRepository,
    private readonly runs: AnalysisRunsService,
    private readonly storage: Storage,
    private readonly pool: ComputePool,
  ) {}

  async run({ recordingId, readId }: Payload, context: JobContext): Promise<void> {
    const recording = await this.begin(recordingId);
    if (recording === undefined) return;
    const prefix = readPrefix(recordingId, readId);
    const result = await this.read(recording, prefix, context);
    if (result === undefined) {
      await this.storage.deleteAll(`${prefix}/`);
    } else if (result.ok) {
      await this.keep(recordingId, prefix, result);
    } else {
      await this.fail(recordingId, result.problem);
    }
  }

  async giveUp({ recordingId, readId }: Payload, problem: ReadProblem): Promise<void> {
    await this.fail(recordingId, problem);
    await this.storage.deleteAll(`${readPrefix(recordingId, readId)}/`);
  }

  /** Marks the reading as begun; undefined when there is nothing left to read. */
  private begin(recordingId: string): Promise<RecordingRow | undefined> {
    return this.database.transaction(async (tx) => {
      const recording = await this.repository.lock(tx, recordingId);
      if (recording?.status !== 'received' && recording?.status !== 'reading') return undefined;
      await this.repository.update(tx, recordingId, { status: 'reading', progress: 0 });
      return recording;
    });
  }

  /** The outcome of reading; undefined when the recording was deleted meanwhile. */
  private async read(
    recording: RecordingRow,
    prefix: string,
    context: JobContext,
  ): Promise<ReadTaskResult | undefined> {
    const input: ReadTaskInput = {
      sourceKey: recording.sourceKey,
      fileName: recording.fileName,
      sizeBytes: recording.fileSize,
      options: recording.importOptions,
      outputPrefix: prefix,
    };
    try {
      return await watched(
        context,
        (progress) => this.repository.writeReadProgress(recording.id, progress),
        (options) => this.pool.run<ReadTaskInput, ReadTaskResult>('read', input, options),
      );
    } catch (error) {
      if (isComputeStopped(error) && !context.signal.aborted) return undefined;
      throw error;
    }
  }

  private async keep(recordingId: string, prefix: string, result: ReadOk): Promise<void> {
    const outdated = await this.database.transaction(async (tx) => {
      const recording = await this.repository.lock(tx, recordingId);
      if (recording?.status !== 'reading') return [`${prefix}/`];
      const earlier = await this.repository.channelsOf(tx, recordingId);
      await this.repository.replaceChannels(
        tx,
        recordingId,
        result.channels.map(({ column: _column, ...channel }) => ({ ...channel, recordingId })),
      );
      const { format, metadata, sampleRateHz, sampleCount, warnings } = result;
      await this.repository.update(tx, recordingId, {
        format,
        metadata,
        sampleRateHz,
        sampleCount,
        warnings,
      });
      const settings = await this.repository.projectSettings(tx, recording.projectId);
      const startedById = recording.uploadedById;
      await this.runs.start(tx, { recordingId, settings, startedById, replacesEarlier: true });
      return [...new Set(earlier.map(({ samplesKey }) => `${dirname(samplesKey)}/`))];
    });
    for (const folder of outdated) await this.storage.deleteAll(folder);
  }

  private async fail(recordingId: string, problem: ReadProblem): Promise<void> {
    await this.database.transaction(async (tx) => {
      const recording = await this.repository.lock(tx, recordingId);
      if (recording?.status !== 'received' && recording?.status !== 'reading') return;
      await this.repository.update(tx, recordingId, { status: 'failed', problem });
    });
  }
}
