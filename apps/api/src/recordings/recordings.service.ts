import { Inject, Injectable } from '@nestjs/common';
import type {
  ReadAgain,
  ReadProblem,
  Recording,
  RecordingQuery,
  UpdateRecording,
} from '@overtally/contracts';
import type { Database, Tx } from '@overtally/db';
import { randomUUID } from 'node:crypto';
import { parse } from 'node:path';
import { problem } from '../common/problem.js';
import { EquipmentService } from '../equipment/equipment.service.js';
import { ChainsService } from '../instruments/chains.service.js';
import { DATABASE } from '../database/database.tokens.js';
import { readRecordingJob } from '../jobs/definitions/read-recording.job.js';
import { JobsService } from '../jobs/jobs.service.js';
import { chooseOptions, type ChosenReading } from '../reading-rules/choose-options.js';
import type { ColumnsUnder } from '../reading-rules/fitting-rule.js';
import { ReadingRulesService } from '../reading-rules/reading-rules.service.js';
import { Storage, type StagedObject } from '../storage/storage.js';
import { AnalysisRunsService } from './analysis-runs.service.js';
import type { UploadFields } from './dto/upload.dto.js';
import { columnBytes, PreviewsService } from './previewing/previews.service.js';
import { recordingPrefix, sourceKey } from './recording-keys.js';
import { recordingNumber } from './recording-number.js';
import { RecordingViewsRepository } from './recording-views.repository.js';
import { UploadLimitsService } from './uploading/upload-limits.service.js';
import { RecordingsRepository, type RecordingRow } from './recordings.repository.js';

const maxNameLength = 160;
const maxFileNameLength = 255;

const readingCancelled: ReadProblem = {
  code: 'reading-cancelled',
  message: 'The reading was called off before it was done',
  cure: 'Read it again; the uploaded file is kept',
};

/** A recording that is being made names nothing yet. */
const unnamed = { equipmentId: null, operatingModeId: null, measuringChainId: null };

export interface Upload {
  /** What the recording is to be known by; where it is there already, it stays the only one. */
  id?: string;
  projectId: string;
  uploadedById: string;
  fileName: string;
  staged: StagedObject;
  fields: UploadFields;
}

/** Recordings: bringing them in, changing what is said of them, taking them away. */
@Injectable()
export class RecordingsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: RecordingsRepository,
    private readonly views: RecordingViewsRepository,
    private readonly runs: AnalysisRunsService,
    private readonly jobs: JobsService,
    private readonly storage: Storage,
    private readonly rules: ReadingRulesService,
    private readonly previews: PreviewsService,
    private readonly limits: UploadLimitsService,
    private readonly equipment: EquipmentService,
    private readonly chains: ChainsService,
  ) {}

  async get(id: string): Promise<Recording> {
    const recording = await this.find(id);
    if (recording === undefined) throw noSuchRecording();
    return recording;
  }

  /** Undefined where there is none, or no more. */
  find(id: string): Promise<Recording | undefined> {
    return this.views.one(id);
  }

  /** Those of the recordings that are still there. */
  async present(ids: readonly string[]): Promise<Recording[]> {
    const found = await Promise.all(ids.map((id) => this.find(id)));
    return found.filter((recording) => recording !== undefined);
  }

  page(projectId: string, query: RecordingQuery) {
    return this.views.page(projectId, query);
  }

  /** Keeps an uploaded file as a new recording and queues its reading. */
  async upload({ projectId, uploadedById, staged, fields, ...upload }: Upload): Promise<Recording> {
    const fileName = upload.fileName.replace(/\p{Cc}/gu, '');
    const { import: _, readingRuleId: __, capturedAt, name, ...bench } = fields;
    const standing = await this.standing(projectId, bench, unnamed);
    const key = sourceKey(projectId, staged.sha256);
    const rules = await this.rules.candidates(projectId, fields);
    const id = await this.database.transaction(async (tx) => {
      await this.repository.lockSource(tx, key);
      if (upload.id !== undefined && (await this.repository.lock(tx, upload.id)) !== undefined)
        return upload.id;
      if (!(await this.repository.isSourceUsed(tx, key)))
        await this.limits.admitSource(tx, projectId, staged.size);
      // The row must not be seen before its file is there; bytes known already are stored once.
      if (!(await this.storage.exists(key))) await staged.commit(key);
      const file = { fileName, fileSize: staged.size, sourceKey: key };
      const reading = await chooseOptions(fields, rules, fileName, this.columnsOf(file));
      const recordingId = await this.repository.insert(tx, {
        id: upload.id,
        projectId,
        uploadedById,
        ...bench,
        ...standing,
        name: name ?? nameFrom(fileName),
        capturedAt: toDate(capturedAt ?? null),
        fileName: fileName.slice(0, maxFileNameLength),
        fileSize: staged.size,
        fileSha256: staged.sha256,
        sourceKey: key,
        importOptions: reading.options,
        ...(await this.rules.reference(tx, reading.readingRule)),
      });
      await this.queueReading(tx, recordingId, reading, uploadedById);
      return recordingId;
    });
    return this.get(id);
  }

  /** Changes bench data; a change of channels is followed by a new analysis that supersedes the earlier ones. */
  async update(id: string, userId: string, change: UpdateRecording): Promise<Recording> {
    await this.database.transaction(async (tx) => {
      const recording = await this.locked(tx, id);
      const { channels, capturedAt, ...bench } = change;
      const moment = capturedAt === undefined ? {} : { capturedAt: toDate(capturedAt) };
      const standing = await this.standing(recording.projectId, bench, recording);
      await this.repository.update(tx, id, { ...bench, ...moment, ...standing });
      if (channels !== undefined && channels.length > 0) {
        await this.changeChannels(tx, recording, userId, channels);
      }
    });
    return this.get(id);
  }

  /** Reads the source again under other options. What the earlier reading gave stands until the new one is done. */
  async readAgain(id: string, userId: string, reading: ReadAgain): Promise<Recording> {
    const { readingRuleId, ...options } = reading;
    const stated = { import: options, readingRuleId };
    const before = await this.repository.find(id);
    if (before === undefined) throw noSuchRecording();
    const rules = await this.rules.candidates(before.projectId, stated);
    const chosen = await chooseOptions(stated, rules, before.fileName, this.columnsOf(before));
    await this.database.transaction(async (tx) => {
      const recording = await this.locked(tx, id);
      if (isBeingRead(recording))
        throw problem(409, 'being-read', 'The recording is being read; wait until it is done');
      await this.runs.cancelAll(tx, id);
      await this.queueReading(tx, recording.id, chosen, userId);
    });
    return this.get(id);
  }

  /**
   * Calls off the reading that is queued or under way. What an earlier reading gave stands again, with its analyses;
   * a recording that was never read fails.
   */
  async cancelReading(id: string, userId: string): Promise<Recording> {
    await this.database.transaction(async (tx) => {
      const recording = await this.locked(tx, id);
      if (!isBeingRead(recording)) {
        throw problem(
          409,
          'not-being-read',
          'The recording is not being read, so there is nothing to call off',
        );
      }
      const wasRead = (await this.repository.channelsOf(tx, id)).length > 0;
      if (wasRead) {
        const settings = await this.repository.settingsFor(tx, recording);
        await this.runs.standAgain(tx, { recordingId: id, settings, startedById: userId });
      } else {
        await this.repository.update(tx, id, { status: 'failed', problem: readingCancelled });
      }
    });
    return this.get(id);
  }

  /** Deletes a recording and all that was computed from it, unless a report refers to one of its verdicts. */
  async delete(id: string): Promise<void> {
    const recording = await this.database.transaction(async (tx) => {
      const row = await this.locked(tx, id);
      const titles = await this.repository.reportsWith(tx, id);
      if (titles.length > 0) {
        const named = titles.map((title) => `“${title}”`).join(', ');
        throw problem(409, 'in-report', `A verdict on this recording stands in ${named}; take it out first`);
      }
      const repeatedBy = await this.repository.repeatedBy(tx, id);
      if (repeatedBy.length > 0) {
        const named = repeatedBy.map(recordingNumber).join(', ');
        const detail = `This recording is one of the repeats that a verdict on ${named} is made of; the verdict goes with ${named} when that is deleted`;
        throw problem(409, 'in-verdict', detail);
      }
      await this.repository.delete(tx, id);
      return row;
    });
    // Keys are spelled as the row has them, which an id in a path need not be.
    await this.storage.deleteAll(recordingPrefix(recording.id));
    await this.deleteUnusedSource(recording.sourceKey);
  }

  /** Deletes a source file unless a recording has it; nobody can bring the same file in meanwhile. */
  async deleteUnusedSource(key: string): Promise<void> {
    await this.database.transaction(async (tx) => {
      await this.repository.lockSource(tx, key);
      const isUsed = await this.repository.isSourceUsed(tx, key);
      if (!isUsed) await this.storage.delete(key);
    });
  }

  /** Tells the columns of a stored file under given options. */
  private columnsOf(file: Pick<RecordingRow, 'fileName' | 'fileSize' | 'sourceKey'>): ColumnsUnder {
    const { fileName, fileSize: sizeBytes, sourceKey: key } = file;
    const end = Math.min(sizeBytes, columnBytes) - 1;
    const head = () =>
      end < 0 ? Promise.resolve(new Uint8Array()) : this.storage.readBytes(key, { start: 0, end });
    return this.previews.columnsOf({ fileName, sizeBytes, head });
  }

  private async queueReading(
    tx: Tx,
    recordingId: string,
    { options, readingRule }: ChosenReading,
    requestedById: string,
  ): Promise<void> {
    const readId = randomUUID();
    await this.repository.update(tx, recordingId, { status: 'received', progress: 0, problem: null, readId });
    await this.jobs.enqueue(tx, readRecordingJob, {
      recordingId,
      readId,
      options,
      readingRule,
      requestedById,
    });
  }

  private async locked(tx: Tx, id: string): Promise<RecordingRow> {
    const recording = await this.repository.lock(tx, id);
    if (recording === undefined) throw noSuchRecording();
    return recording;
  }

  /**
   * Columns for what was tested and through what, checked.
   * @throws 422 for what the project has not, and for what is retired and was not named before
   */
  private async standing(
    projectId: string,
    { eut, equipmentId, operatingModeId, measuringChainId }: Omit<UpdateRecording, 'channels'>,
    before: Pick<RecordingRow, 'equipmentId' | 'operatingModeId' | 'measuringChainId'>,
  ) {
    const named = await this.equipment.named(projectId, { equipmentId, operatingModeId }, before);
    if (typeof measuringChainId === 'string' && measuringChainId !== before.measuringChainId) {
      await this.chains.demandInUse([{ path: 'measuringChainId', id: measuringChainId }]);
    }
    return eut === undefined ? named : { ...named, eut };
  }

  /** Changes channels; other names, units or scales are followed by a new analysis. */
  private async changeChannels(
    tx: Tx,
    recording: RecordingRow,
    userId: string,
    changes: NonNullable<UpdateRecording['channels']>,
  ): Promise<void> {
    const { id } = recording;
    const rows = await this.repository.channelsOf(tx, id);
    const known = new Set(rows.map(({ index }) => index));
    if (isBeingRead(recording) || known.size === 0) {
      throw problem(409, 'not-read', 'The channels can be changed once the recording has been read');
    }
    const errors = changes.flatMap(({ index }, place) =>
      known.has(index)
        ? []
        : [{ path: `channels.${place}.index`, message: `The recording has no channel ${index}` }],
    );
    if (errors.length > 0)
      throw problem(400, 'invalid-request', 'A channel is not known; see errors', errors);
    const before = new Map(rows.map((row) => [row.index, row.measuringChainId]));
    await this.chains.demandInUse(
      changes.flatMap(({ index, measuringChainId: chainId }, place) =>
        typeof chainId === 'string' && chainId !== before.get(index)
          ? [{ path: `channels.${place}.measuringChainId`, id: chainId }]
          : [],
      ),
    );
    for (const { index, ...change } of changes) {
      if (Object.keys(change).length > 0) await this.repository.updateChannel(tx, id, index, change);
    }
    const rescales = changes.some(
      ({ index: _, measuringChainId: __, ...scale }) => Object.keys(scale).length > 0,
    );
    if (!rescales) return;
    const settings = await this.repository.settingsFor(tx, recording);
    await this.runs.start(tx, { recordingId: id, settings, startedById: userId, replacesEarlier: true });
  }
}

function isBeingRead({ status }: RecordingRow): boolean {
  return status === 'received' || status === 'reading';
}

function toDate(moment: string | null): Date | null {
  return moment === null ? null : new Date(moment);
}

function nameFrom(fileName: string): string {
  const name = parse(fileName).name.trim().slice(0, maxNameLength);
  return name === '' ? 'Unnamed' : name;
}

function noSuchRecording() {
  return problem(404, 'not-found', 'There is no such recording');
}
