import { Inject, Injectable } from '@nestjs/common';
import type { ReadProblem } from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { dirname } from 'node:path/posix';
import type { z } from 'zod';
import { DATABASE } from '../../database/database.tokens.js';
import { ComputePool } from '../../jobs/compute-pool.js';
import { isComputeStopped } from '../../jobs/compute-task.js';
import { readRecordingJob } from '../../jobs/definitions/read-recording.job.js';
import type { JobContext, JobHandler } from '../../jobs/job-handler.js';
import { watched } from '../../jobs/watched-compute.js';
import { ReadingRulesService } from '../../reading-rules/reading-rules.service.js';
import { Storage } from '../../storage/storage.js';
import { AnalysisRunsService } from '../analysis-runs.service.js';
import { readPrefix } from '../recording-keys.js';
import { RecordingsRepository, type ChannelRow, type RecordingRow } from '../recordings.repository.js';
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
    private readonly rules: ReadingRulesService,
    private readonly runs: AnalysisRunsService,
    private readonly storage: Storage,
    private readonly pool: ComputePool,
  ) {}

  async run(payload: Payload, context: JobContext): Promise<void> {
    const recording = await this.begin(payload);
    if (recording === undefined) return;
    const result = await this.read(recording, payload, context);
    if (result === undefined) {
      await this.discard(payload);
    } else if (result.ok) {
      await this.keep(payload, result);
    } else {
      await this.fail(payload, underRule(result.problem, payload));
    }
  }

  async giveUp(payload: Payload, problem: ReadProblem): Promise<void> {
    await this.fail(payload, problem);
    await this.discard(payload);
  }

  /** Marks the reading as begun; undefined when there is nothing left to read. */
  private begin(payload: Payload): Promise<RecordingRow | undefined> {
    return this.database.transaction(async (tx) => {
      const recording = await this.lockWanted(tx, payload);
      if (recording === undefined) return undefined;
      await this.repository.update(tx, recording.id, { status: 'reading', progress: 0 });
      return recording;
    });
  }

  /** The recording, held until the transaction ends, while this reading of it is wanted. */
  private async lockWanted(tx: Tx, { recordingId, readId }: Payload): Promise<RecordingRow | undefined> {
    const recording = await this.repository.lock(tx, recordingId);
    if (recording?.status !== 'received' && recording?.status !== 'reading') return undefined;
    // Null: asked for before the product kept this.
    return recording.readId === null || recording.readId === readId ? recording : undefined;
  }

  /** The outcome of reading; undefined when the recording was deleted meanwhile, or the reading called off. */
  private async read(
    recording: RecordingRow,
    { readId, options: importOptions }: Payload,
    context: JobContext,
  ): Promise<ReadTaskResult | undefined> {
    const input: ReadTaskInput = {
      sourceKey: recording.sourceKey,
      fileName: recording.fileName,
      sizeBytes: recording.fileSize,
      options: importOptions,
      outputPrefix: readPrefix(recording.id, readId),
    };
    try {
      return await watched(
        context,
        (progress) => this.repository.writeReadProgress(recording.id, readId, progress),
        (options) => this.pool.run<ReadTaskInput, ReadTaskResult>('read', input, options),
      );
    } catch (error) {
      if (isComputeStopped(error) && !context.signal.aborted) return undefined;
      throw error;
    }
  }

  private async keep(payload: Payload, result: ReadOk): Promise<void> {
    const { recordingId, options: importOptions, requestedById: startedById } = payload;
    const outdated = await this.database.transaction(async (tx) => {
      const recording = await this.lockWanted(tx, payload);
      if (recording === undefined) return undefined;
      const earlier = await this.repository.channelsOf(tx, recordingId);
      await this.repository.replaceChannels(
        tx,
        recordingId,
        result.channels.map(({ column: _column, ...channel }) => ({
          ...channel,
          recordingId,
          measuringChainId: keptChain(channel, earlier, result.channels),
        })),
      );
      const { format, metadata, sampleRateHz, sampleCount, warnings } = result;
      await this.repository.update(tx, recordingId, {
        importOptions,
        ...(await this.rules.reference(tx, payload.readingRule)),
        format,
        metadata,
        sampleRateHz,
        sampleCount,
        warnings,
      });
      const settings = await this.repository.projectSettings(tx, recording.projectId);
      await this.runs.start(tx, { recordingId, settings, startedById, replacesEarlier: true });
      return [...new Set(earlier.map(({ samplesKey }) => `${dirname(samplesKey)}/`))];
    });
    if (outdated === undefined) await this.discard(payload);
    for (const folder of outdated ?? []) await this.storage.deleteAll(folder);
  }

  /** Removes what a reading stored, unless the same reading, run twice, was kept the other time. */
  private async discard({ recordingId, readId }: Payload): Promise<void> {
    const folder = `${readPrefix(recordingId, readId)}/`;
    await this.database.transaction(async (tx) => {
      await this.repository.lock(tx, recordingId);
      const current = await this.repository.channelsOf(tx, recordingId);
      if (current.some(({ samplesKey }) => samplesKey.startsWith(folder))) return;
      await this.storage.deleteAll(folder);
    });
  }

  private async fail(payload: Payload, problem: ReadProblem): Promise<void> {
    await this.database.transaction(async (tx) => {
      const recording = await this.lockWanted(tx, payload);
      if (recording === undefined) return;
      await this.repository.update(tx, recording.id, { status: 'failed', problem });
    });
  }
}

type Named = Pick<ChannelRow, 'index' | 'name' | 'quantity'>;

/** The chain of an earlier channel that is the same one: by name, else by place where neither name stands elsewhere. */
export function keptChain(
  channel: Named,
  earlier: readonly (Named & Pick<ChannelRow, 'measuringChainId'>)[],
  channels: readonly Named[],
): string | null {
  const sameName = earlier.find(({ name }) => name === channel.name);
  if (sameName !== undefined) return sameName.measuringChainId;
  const samePlace = earlier.find(
    ({ index, quantity }) => index === channel.index && quantity === channel.quantity,
  );
  if (samePlace === undefined || channels.some(({ name }) => name === samePlace.name)) return null;
  return samePlace.measuringChainId;
}

/** A problem of a file that was read by a rule: the fault may lie in the rule, which whoever sent the file may not know. */
function underRule(problem: ReadProblem, { readingRule }: Payload): ReadProblem {
  if (readingRule === null) return problem;
  return {
    ...problem,
    message: `Read by the reading rule “${readingRule.name}”: ${problem.message}`,
    cure: `${problem.cure} If the rule does not suit this file, change the rule or read the file again without it.`,
  };
}
