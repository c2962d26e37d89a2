import { Injectable } from '@nestjs/common';
import { previewRecording } from '@overtally/ingest';
import type { UploadOutcome } from '@overtally/contracts';
import { randomUUID } from 'node:crypto';
import type { ZipFile } from 'yauzl';
import { problem, ProblemException } from '../../../common/problem.js';
import { AppConfig } from '../../../config/app-config.js';
import { Storage } from '../../../storage/storage.js';
import type { UploadFields } from '../../dto/upload.dto.js';
import { RecordingsService } from '../../recordings.service.js';
import { fileIsZip } from '../is-zip.js';
import { memberRecordingId } from '../member-recording-id.js';
import type { SpoolOutcome } from '../spool-records.js';
import { UploadLimitsService } from '../upload-limits.service.js';
import { UploadSpool, type UploadOwner } from '../upload-spool.js';
import { openArchive, readMembers, shownPath } from './archive-members.js';
import { capturesOf, toldBytes, unpacked, type ArchivedCapture } from './archived-captures.js';
import { demandModest, UnpackBudget } from './inflate-member.js';
import { MemberRefused } from './member-refused.js';
import { peeked } from './peeked.js';

/** What is no capture at all, such as the notes beside one; a capture that cannot be read becomes a recording that says why. */
const noCapture = new Set(['not-a-capture', 'empty-file', 'no-numbers']);

/** As much as tells what a file is. */
const headBytes = 128 * 1024;

export interface Unpacking {
  archive: {
    /** Ids of the recordings follow from it. */
    uploadId: string;
    /** Where the archive lies on this server. */
    path: string;
  };
  owner: UploadOwner;
  /** What is said of every recording; a name is that of its file. */
  fields: UploadFields;
  signal: AbortSignal;
}

/** Captures in ZIP archives. */
@Injectable()
export class ArchivesService {
  constructor(
    private readonly recordings: RecordingsService,
    private readonly limits: UploadLimitsService,
    private readonly spool: UploadSpool,
    private readonly storage: Storage,
    private readonly config: AppConfig,
  ) {}

  /**
   * Makes a recording of each capture in an archive, one after the other. What may not come in is told with its reason and
   * does not keep the others out; what came in stays when the work is broken off, and is not made again.
   * @throws ProblemException 422 for an archive that cannot be read or holds nothing, 507 where it does not fit
   */
  async unpack(unpacking: Unpacking): Promise<SpoolOutcome> {
    const zip = await openArchive(unpacking.archive.path);
    try {
      const { members, leftOut: unfit } = await readMembers(zip);
      const { captures, leftOut: unused } = capturesOf(members);
      const leftOut = [...unfit, ...unused];
      if (captures.length === 0 && leftOut.length === 0)
        throw problem(422, 'archive-empty', 'The archive holds no file');
      const budget = new UnpackBudget(this.config.maxUploadBytes);
      const told = captures.reduce((sum, capture) => sum + toldBytes(capture), 0);
      if (this.config.storage.kind === 'disk')
        await this.spool.demandRoom(Math.min(told, this.config.maxUploadBytes));
      const recordingIds: string[] = [];
      for (const capture of captures) {
        unpacking.signal.throwIfAborted();
        try {
          recordingIds.push(await this.bringIn(zip, capture, unpacking, budget));
        } catch (error) {
          const reason = reasonOf(error);
          leftOut.push(...capture.members.map(({ path }) => ({ path, reason })));
        }
      }
      return {
        recordingIds,
        leftOut: leftOut.map(({ path, reason }) => ({ path: shownPath(path), reason })),
      };
    } finally {
      zip.close();
    }
  }

  /**
   * Makes recordings of an archive that came in a form.
   * @throws ProblemException 400 `not-an-archive` for another file, else as `unpack`
   */
  async unpackForm(path: string, unpacking: Omit<Unpacking, 'archive'>): Promise<UploadOutcome> {
    if (!(await fileIsZip(path))) {
      const message =
        'The file is no ZIP archive. Send a single capture to the route that ends in /recordings';
      throw problem(400, 'not-an-archive', message, [{ path: 'file', message: 'This is no ZIP archive' }]);
    }
    const archive = { uploadId: randomUUID(), path };
    const { recordingIds, leftOut } = await this.unpack({ ...unpacking, archive });
    return { items: await this.recordings.present(recordingIds), leftOut };
  }

  private async bringIn(
    zip: ZipFile,
    capture: ArchivedCapture,
    { archive, owner, fields, signal }: Unpacking,
    budget: UnpackBudget,
  ): Promise<string> {
    const id = memberRecordingId(archive.uploadId, capture.path);
    if ((await this.recordings.find(id)) !== undefined) return id;
    for (const member of capture.members) demandModest(member, budget);
    await this.limits.admit(owner.projectId, toldBytes(capture));
    const { fileName, bytes } = await unpacked(zip, capture, budget, signal);
    const staged = await this.storage.stage(looked(fileName, toldBytes(capture), bytes));
    try {
      const { name: _, ...bench } = fields;
      const source = { fileName, staged, fields: bench };
      await this.recordings.upload({ id, projectId: owner.projectId, uploadedById: owner.userId, ...source });
      return id;
    } finally {
      await staged.discard();
    }
  }
}

/** The bytes of a capture. @throws MemberRefused when their beginning is that of something else, such as an archive */
async function* looked(fileName: string, sizeBytes: number, bytes: AsyncGenerator<Uint8Array>) {
  const { head, whole } = await peeked(bytes, headBytes);
  try {
    const { problem: found } = await previewRecording(head, { fileName, sizeBytes });
    if (found !== null && noCapture.has(found.code))
      throw new MemberRefused(`${found.message} ${found.cure}`);
    yield* whole;
  } finally {
    await whole.return(undefined);
  }
}

/** Why a file of an archive stays out. @throws what is no fault of the file */
function reasonOf(error: unknown): string {
  if (error instanceof MemberRefused) return error.message;
  if (error instanceof ProblemException && error.getStatus() === 413) return error.detail;
  throw error;
}
