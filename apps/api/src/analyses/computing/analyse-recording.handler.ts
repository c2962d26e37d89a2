import { Inject, Injectable } from '@nestjs/common';
import type { ReadProblem } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import type { z } from 'zod';
import { DATABASE } from '../../database/database.tokens.js';
import { ComputePool } from '../../jobs/compute-pool.js';
import { isComputeStopped } from '../../jobs/compute-task.js';
import { analyseRecordingJob } from '../../jobs/definitions/analyse-recording.job.js';
import type { JobContext, JobHandler } from '../../jobs/job-handler.js';
import { watched } from '../../jobs/watched-compute.js';
import { AnalysisRunsService } from '../../recordings/analysis-runs.service.js';
import { analysisPrefix } from '../../recordings/recording-keys.js';
import { Storage } from '../../storage/storage.js';
import { AnalysesRepository } from '../analyses.repository.js';
import { cancelledProblem } from '../analyses.service.js';
import type { AnalyseTaskInput, AnalyseTaskResult } from './analyse-task.js';

type Payload = z.infer<typeof analyseRecordingJob.payload>;

interface Work {
  recordingId: string;
  input: AnalyseTaskInput;
}

/** Computes an analysis and keeps its figures. */
@Injectable()
export class AnalyseRecordingHandler implements JobHandler<Payload> {
  readonly definition = analyseRecordingJob;

  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: AnalysesRepository,
    private readonly runs: AnalysisRunsService,
    private readonly storage: Storage,
    private readonly pool: ComputePool,
  ) {}

  async run({ analysisId }: Payload, context: JobContext): Promise<void> {
    const work = await this.begin(analysisId);
    if (work === undefined) return;
    const result = await this.compute(analysisId, work, context);
    const kept = await this.end(analysisId, result);
    if (!kept) await this.storage.deleteAll(`${work.input.outputPrefix}/`);
  }

  async giveUp({ analysisId }: Payload, problem: ReadProblem): Promise<void> {
    await this.end(analysisId, { ok: false, problem });
  }

  /** Marks the analysis as running and gathers its input; undefined when there is nothing left to do. */
  private begin(id: string): Promise<Work | undefined> {
    return this.database.transaction(async (tx) => {
      const locked = await this.repository.lock(tx, id);
      if (locked === undefined) return undefined;
      const { analysis, recording } = locked;
      if (analysis.status === 'done' || analysis.status === 'failed') return undefined;
      const { sampleRateHz, sampleCount } = recording;
      if (analysis.cancelRequestedAt !== null || sampleRateHz === null || sampleCount === null) {
        await this.repository.fail(tx, id, cancelledProblem);
        await this.runs.settleRecording(tx, recording.id);
        return undefined;
      }
      await this.repository.begin(tx, id);
      const channels = await this.repository.recordedChannels(tx, recording.id);
      const outputPrefix = analysisPrefix(recording.id, id);
      const { settings } = analysis;
      const { warnings } = recording;
      const input = { channels, sampleRateHz, sampleCount, warnings, settings, outputPrefix };
      return { recordingId: recording.id, input };
    });
  }

  private async compute(
    id: string,
    { recordingId, input }: Work,
    context: JobContext,
  ): Promise<AnalyseTaskResult> {
    try {
      return await watched(
        context,
        (progress) => this.repository.writeProgress(id, recordingId, progress),
        (options) => this.pool.run<AnalyseTaskInput, AnalyseTaskResult>('analyse', input, options),
      );
    } catch (error) {
      if (isComputeStopped(error) && !context.signal.aborted) return { ok: false, problem: cancelledProblem };
      throw error;
    }
  }

  /** Keeps the outcome of an analysis that is still under way; true when figures were kept. */
  private end(id: string, result: AnalyseTaskResult): Promise<boolean> {
    return this.database.transaction(async (tx) => {
      const locked = await this.repository.lock(tx, id);
      if (locked === undefined) return false;
      const { analysis, recording } = locked;
      if (analysis.status === 'done' || analysis.status === 'failed') return analysis.status === 'done';
      const cancelled = analysis.cancelRequestedAt !== null;
      if (cancelled || !result.ok) {
        await this.repository.fail(tx, id, cancelled || result.ok ? cancelledProblem : result.problem);
      } else {
        await this.repository.finish(tx, id, result);
      }
      await this.runs.settleRecording(tx, recording.id);
      return !cancelled && result.ok;
    });
  }
}
