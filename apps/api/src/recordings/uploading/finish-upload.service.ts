import { Injectable } from '@nestjs/common';
import type { FinishUpload, UploadOutcome } from '@overtally/contracts';
import { problem } from '../../common/problem.js';
import { hashFile } from '../../storage/hash-file.js';
import { Storage, StorageObjectMissing, type StagedObject } from '../../storage/storage.js';
import { sourceKey } from '../recording-keys.js';
import { RecordingsService } from '../recordings.service.js';
import { ArchivesService } from './archives/archives.service.js';
import { fileIsZip } from './is-zip.js';
import { memberRecordingId } from './member-recording-id.js';
import { noSuchUpload } from './resumable-uploads.service.js';
import type { SpoolOutcome, SpoolRecord } from './spool-records.js';
import { fileNameOf, UploadSpool, type UploadOwner } from './upload-spool.js';

export interface Finish {
  owner: UploadOwner;
  uploadId: string;
  fields: FinishUpload;
  /** Ends the work when who asked has gone. */
  signal: AbortSignal;
}

/** Makes recordings of an upload that has arrived whole. */
@Injectable()
export class FinishUploadService {
  constructor(
    private readonly spool: UploadSpool,
    private readonly recordings: RecordingsService,
    private readonly archives: ArchivesService,
    private readonly storage: Storage,
  ) {}

  /**
   * Makes recordings of an upload. Who asks again, since the reply was lost or at the same time, gets the same ones: their
   * ids follow from that of the upload.
   * @throws ProblemException 404 for an upload that is not there, 409 while bytes are missing, 422 `checksum-mismatch`
   */
  async finish(request: Finish): Promise<UploadOutcome> {
    const { uploadId, owner, signal } = request;
    const isOwn = (await this.spool.find(uploadId, owner)) !== undefined;
    if (!isOwn) throw noSuchUpload();
    return this.spool.locks.hold(uploadId, signal, async () => {
      const record = await this.spool.find(uploadId, owner);
      if (record === undefined) throw noSuchUpload();
      const outcome = record.outcome ?? (await this.settle(request, record));
      return { items: await this.recordings.present(outcome.recordingIds), leftOut: outcome.leftOut };
    });
  }

  private async settle(request: Finish, record: SpoolRecord): Promise<SpoolOutcome> {
    const { uploadId } = request;
    const expected = record.upload.size ?? 0;
    const received = await this.spool.receivedBytes(uploadId);
    if (received === undefined && record.sha256 === undefined) throw noSuchUpload();
    if (received !== undefined && received !== expected) throw incomplete(received, expected);
    const isArchive = received !== undefined && (await fileIsZip(this.spool.path(uploadId)));
    const outcome = isArchive ? await this.unpack(request, record) : await this.keep(request, record);
    await this.spool.settle(uploadId, (await this.spool.records.find(uploadId)) ?? record, outcome);
    return outcome;
  }

  private async keep({ owner, uploadId, fields }: Finish, record: SpoolRecord): Promise<SpoolOutcome> {
    const { sha256: wanted, ...bench } = fields;
    const staged = await this.staged(uploadId, owner, record);
    try {
      await this.demandChecksum(uploadId, staged.sha256, wanted);
      // Told before the bytes leave, so that a process that ends between them and their recording is made good for.
      await this.spool.records.write(uploadId, { ...record, sha256: staged.sha256 });
      const { id } = await this.recordings.upload({
        id: memberRecordingId(uploadId, ''),
        projectId: owner.projectId,
        uploadedById: owner.userId,
        fileName: fileNameOf(record),
        staged,
        fields: bench,
      });
      return { recordingIds: [id], leftOut: [] };
    } finally {
      await staged.discard();
    }
  }

  private async unpack({ owner, uploadId, fields, signal }: Finish, record: SpoolRecord) {
    const { sha256: wanted, ...bench } = fields;
    const path = this.spool.path(uploadId);
    if (wanted !== undefined) {
      const { sha256 } = await hashFile(path);
      await this.demandChecksum(uploadId, sha256, wanted);
    }
    const archive = { uploadId, path, fileName: fileNameOf(record) };
    return this.archives.unpack({ archive, owner, fields: bench, signal });
  }

  /** The bytes in the spool, or in storage where they were put just before a process ended. */
  private async staged(uploadId: string, owner: UploadOwner, record: SpoolRecord): Promise<StagedObject> {
    if ((await this.spool.receivedBytes(uploadId)) !== undefined)
      return this.storage.stageFile(this.spool.path(uploadId));
    const { sha256 = '' } = record;
    const key = sourceKey(owner.projectId, sha256);
    return {
      sha256,
      size: record.upload.size ?? 0,
      commit: () => Promise.reject(new StorageObjectMissing(key)),
      discard: () => Promise.resolve(),
    };
  }

  private async demandChecksum(uploadId: string, found: string, wanted?: string): Promise<void> {
    if (wanted === undefined || wanted === found) return;
    await this.spool.drop(uploadId);
    throw problem(
      422,
      'checksum-mismatch',
      `The file has changed on its way: what arrived has the SHA-256 ${found}, the sender's has ${wanted}. What arrived was dropped; send the file again`,
      [{ path: 'sha256', message: `What arrived has ${found}` }],
    );
  }
}

function incomplete(received: number, expected: number) {
  return problem(
    409,
    'upload-incomplete',
    `${received} of ${expected} bytes have arrived; send the rest, then finish`,
  );
}
