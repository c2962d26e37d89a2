import { Injectable } from '@nestjs/common';
import type { ReadProblem, RecordingStatus, Settings } from '@overtally/contracts';
import { schema, type Tx } from '@overtally/db';
import { and, desc, eq, inArray, isNull, ne } from 'drizzle-orm';
import { analyseRecordingJob } from '../jobs/definitions/analyse-recording.job.js';
import { JobsService } from '../jobs/jobs.service.js';

const { analyses, recordings } = schema;

/** Starts analyses of a recording and keeps the recording's status in step with them. */
@Injectable()
export class AnalysisRunsService {
  constructor(private readonly jobs: JobsService) {}

  /**
   * Queues an analysis. The caller holds the lock on the recording.
   * @param run.replacesEarlier the samples or their scaling changed, so that earlier analyses no longer stand
   * @returns the id of the analysis
   */
  async start(
    tx: Tx,
    run: { recordingId: string; settings: Settings; startedById: string; replacesEarlier: boolean },
  ): Promise<string> {
    const { recordingId, settings, startedById } = run;
    const [created] = await tx
      .insert(analyses)
      .values({ recordingId, settings, startedById })
      .returning({ id: analyses.id });
    const id = created!.id;
    if (run.replacesEarlier) await this.supersede(tx, recordingId, id);
    await this.jobs.enqueue(tx, analyseRecordingJob, { analysisId: id });
    await tx
      .update(recordings)
      .set({ status: 'analysing', progress: 0, problem: null })
      .where(eq(recordings.id, recordingId));
    return id;
  }

  /** Asks the running analyses of a recording to end. */
  async cancelAll(tx: Tx, recordingId: string): Promise<void> {
    await tx
      .update(analyses)
      .set({ cancelRequestedAt: new Date() })
      .where(and(eq(analyses.recordingId, recordingId), inArray(analyses.status, ['queued', 'running'])));
  }

  /**
   * Sets the recording's status after an analysis has ended: analysing while another is under way, ready when a
   * finished one stands, else failed with the problem of the newest. A reading under way is left alone.
   */
  async settleRecording(tx: Tx, recordingId: string): Promise<void> {
    const runs = await tx
      .select({ status: analyses.status, problem: analyses.problem })
      .from(analyses)
      .where(and(eq(analyses.recordingId, recordingId), isNull(analyses.supersededById)))
      .orderBy(desc(analyses.createdAt), desc(analyses.id));
    await tx
      .update(recordings)
      .set(stateAfter(runs))
      .where(
        and(eq(recordings.id, recordingId), inArray(recordings.status, ['analysing', 'ready', 'failed'])),
      );
  }

  /**
   * Lets the reading that is kept stand again, after another one was called off: with the analyses there are, or with a
   * new one when the other reading had them called off before one was done.
   */
  async standAgain(
    tx: Tx,
    run: { recordingId: string; settings: Settings; startedById: string },
  ): Promise<void> {
    const { recordingId } = run;
    const runs = await tx
      .select({ status: analyses.status, cancelRequestedAt: analyses.cancelRequestedAt })
      .from(analyses)
      .where(and(eq(analyses.recordingId, recordingId), isNull(analyses.supersededById)));
    const isDone = runs.some(({ status }) => status === 'done');
    if (!isDone && runs.some(({ cancelRequestedAt }) => cancelRequestedAt !== null)) {
      await this.start(tx, { ...run, replacesEarlier: false });
      return;
    }
    await tx.update(recordings).set({ status: 'analysing' }).where(eq(recordings.id, recordingId));
    await this.settleRecording(tx, recordingId);
  }

  private async supersede(tx: Tx, recordingId: string, byId: string): Promise<void> {
    await tx
      .update(analyses)
      .set({ supersededById: byId })
      .where(
        and(eq(analyses.recordingId, recordingId), isNull(analyses.supersededById), ne(analyses.id, byId)),
      );
    await tx
      .update(analyses)
      .set({ cancelRequestedAt: new Date() })
      .where(
        and(
          eq(analyses.recordingId, recordingId),
          ne(analyses.id, byId),
          inArray(analyses.status, ['queued', 'running']),
        ),
      );
  }
}

interface RecordingState {
  status: RecordingStatus;
  progress?: number;
  problem: ReadProblem | null;
}

function stateAfter(runs: { status: string; problem: ReadProblem | null }[]): RecordingState {
  if (runs.some(({ status }) => status === 'queued' || status === 'running')) {
    return { status: 'analysing', problem: null };
  }
  if (runs.some(({ status }) => status === 'done')) return { status: 'ready', progress: 1, problem: null };
  return { status: 'failed', problem: runs[0]?.problem ?? null };
}
