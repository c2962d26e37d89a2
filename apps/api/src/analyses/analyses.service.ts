import { Inject, Injectable } from '@nestjs/common';
import {
  windowNameSchema,
  type Analysis,
  type ReadProblem,
  type Settings,
  type Spectrum,
  type spectrumQuerySchema,
} from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { z } from 'zod';
import { decodeCursor, pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { AnalysisRunsService } from '../recordings/analysis-runs.service.js';
import { npyCount, readNpy } from '../storage/npy.js';
import { Storage } from '../storage/storage.js';
import { AnalysesRepository, type AnalysisChannelRow } from './analyses.repository.js';
import { toAnalysis, toAnalysisHead } from './analysis-view.js';
import { thinned } from './spectrum.js';

const cursorShape = z.tuple([z.iso.datetime(), z.uuid()]);

/** What an analysis that was called off ends with. */
export const cancelledProblem: ReadProblem = {
  code: 'cancelled',
  message: 'Cancelled on request',
  cure: 'Start the analysis again when it is wanted.',
};

/** Analyses: starting, calling off and reading them. */
@Injectable()
export class AnalysesService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: AnalysesRepository,
    private readonly runs: AnalysisRunsService,
    private readonly storage: Storage,
  ) {}

  /** An analysis with all its figures. */
  async get(id: string): Promise<Analysis> {
    const analysis = await this.find(id);
    if (analysis === undefined) throw noSuchAnalysis();
    return analysis;
  }

  /** Undefined where there is none, or no more. */
  async find(id: string): Promise<Analysis | undefined> {
    const row = await this.repository.find(id);
    if (row === undefined) return undefined;
    // After the state: an analysis that is done has its figures, whereas those read before may lack them.
    const [channels, harmonics] = await Promise.all([
      this.repository.channelsOf(id),
      this.repository.harmonicsOf(id),
    ]);
    return toAnalysis(row, channels, harmonics);
  }

  /** Analyses of a recording without their figures, the newest first. */
  async page(recordingId: string, { cursor, limit }: { cursor?: string; limit: number }) {
    const place = decodeCursor(cursor, cursorShape);
    const after = place && { createdAt: place[0], id: place[1] };
    const rows = await this.repository.page(recordingId, limit + 1, after);
    return pageOfRows(rows, limit, (row) => [row.createdAt.toISOString(), row.id], toAnalysisHead);
  }

  /** Queues an analysis under `settings`; earlier ones stand beside it. */
  async start(recordingId: string, settings: Settings, userId: string): Promise<Analysis> {
    const id = await this.database.transaction(async (tx) => {
      const recording = await this.repository.lockRecording(tx, recordingId);
      if (recording === undefined) throw problem(404, 'not-found', 'There is no such recording');
      const isRead = (await this.repository.recordedChannels(tx, recordingId)).length > 0;
      if (!isRead || recording.status === 'received' || recording.status === 'reading') {
        throw problem(409, 'not-read', 'There is nothing to analyse until the recording has been read');
      }
      return this.runs.start(tx, { recordingId, settings, startedById: userId, replacesEarlier: false });
    });
    return this.get(id);
  }

  /** Calls an analysis off: at once while it waits, else as soon as the worker notices. */
  async cancel(id: string): Promise<Analysis> {
    await this.database.transaction(async (tx) => {
      const locked = await this.repository.lock(tx, id);
      if (locked === undefined) throw noSuchAnalysis();
      const { status } = locked.analysis;
      if (status === 'done' || status === 'failed') {
        throw problem(409, 'already-ended', 'The analysis has ended already');
      }
      await this.repository.requestCancel(tx, id);
      if (status === 'queued') {
        await this.repository.fail(tx, id, cancelledProblem);
        await this.runs.settleRecording(tx, locked.recording.id);
      }
    });
    return this.get(id);
  }

  /**
   * Stored figures of one channel of an analysis that is done.
   * @throws 404 for a channel that is not there, 409 until the analysis is done
   */
  async channel(id: string, index: number): Promise<AnalysisChannelRow> {
    const channel = (await this.repository.channelsOf(id)).find((row) => row.index === index);
    if (channel !== undefined) return channel;
    const analysis = await this.repository.find(id);
    throw analysis?.status === 'done'
      ? problem(404, 'no-such-channel', `The analysis has no channel ${index}`)
      : problem(409, 'not-done', 'The analysis has no figures until it is done');
  }

  /** The spectrum of one channel in at most `maxPoints` lines, as rms of a line or per root of the bandwidth. */
  async spectrum(
    id: string,
    { channel: index, maxPoints, scaling }: z.infer<typeof spectrumQuerySchema>,
  ): Promise<Spectrum> {
    const channel = await this.channel(id, index);
    const { spectrumKey, spectrumStartHz, spectrumStepHz, spectrumNoiseBandwidthHz, unit } = channel;
    const divisor = scaling === 'density' ? Math.sqrt(knownBandwidth(channel)) : 1;
    const rms = await readNpy(this.storage, spectrumKey, 0, await npyCount(this.storage, spectrumKey));
    for (let k = 0; k < rms.length; k += 1) rms[k]! /= divisor;
    return {
      channel: index,
      unit: scaling === 'density' ? `${unit}/√Hz` : unit,
      window: windowNameSchema.parse(channel.spectrumWindow),
      resolutionHz: spectrumStepHz,
      noiseBandwidthHz: spectrumNoiseBandwidthHz,
      segments: channel.spectrumSegments,
      scaling,
      ...thinned(rms, spectrumStartHz, spectrumStepHz, maxPoints),
    };
  }
}

function noSuchAnalysis() {
  return problem(404, 'not-found', 'There is no such analysis');
}

function knownBandwidth({ spectrumNoiseBandwidthHz }: AnalysisChannelRow): number {
  if (spectrumNoiseBandwidthHz !== null) return spectrumNoiseBandwidthHz;
  const detail = 'This analysis was made before the noise bandwidth was kept; analyse the recording again';
  throw problem(409, 'no-noise-bandwidth', detail);
}
