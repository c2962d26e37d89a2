import { Inject, Injectable } from '@nestjs/common';
import { maxCertificateBytes, type Calibration, type CreateCalibration } from '@overtally/contracts';
import type { Database } from '@overtally/db';
import { createHash, randomUUID } from 'node:crypto';
import type { Readable } from 'node:stream';
import { pageOfRows } from '../common/paging.js';
import { problem } from '../common/problem.js';
import { DATABASE } from '../database/database.tokens.js';
import { isReferredViolation } from '../database/referred-violation.js';
import { Storage } from '../storage/storage.js';
import { dayOf, daysLater } from './calibration-at.js';
import { calibrationPrefix, certificateKey } from './calibration-keys.js';
import { certificateKind, contentTypeOf } from './certificate-kind.js';
import { toCalibration } from './instrument-view.js';
import { InstrumentsRepository } from './instruments.repository.js';
import { noSuchInstrument } from './instruments.service.js';

const maxNameLength = 255;

export interface CertificateFile {
  name: string;
  bytes: Uint8Array;
}

export interface StoredCertificate {
  stream: Readable;
  name: string;
  size: number;
  sha256: string;
  contentType: string;
}

/** Calibrations of instruments with their certificates. */
@Injectable()
export class CalibrationsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly repository: InstrumentsRepository,
    private readonly storage: Storage,
  ) {}

  /** The newest first. @throws 404 */
  async page(instrumentId: string, { cursor, limit }: { cursor?: string; limit: number }) {
    await this.demandInstrument(instrumentId);
    const rows = await this.repository.calibrationPage(instrumentId, cursor, limit);
    return pageOfRows(
      rows,
      limit,
      ({ calibratedOn, createdAt, id }) => [calibratedOn, createdAt.toISOString(), id],
      toCalibration,
    );
  }

  /**
   * Enters a calibration.
   * @param certificate its certificate: PDF, PNG or JPEG
   * @throws 404, 422 for a day that has not come and for a file of another kind
   */
  async create(
    instrumentId: string,
    createdById: string,
    input: CreateCalibration,
    certificate?: CertificateFile,
  ): Promise<Calibration> {
    await this.demandInstrument(instrumentId);
    // Tomorrow in UTC is today somewhere.
    if (input.calibratedOn > daysLater(dayOf(new Date()), 1)) {
      throw unfit('calibratedOn', 'Calibration lies in the future; enter it once it is done');
    }
    const id = randomUUID();
    const stored = certificate && (await this.store(id, certificate));
    const row = await this.database.transaction((tx) =>
      this.repository.insertCalibration(tx, { ...input, ...stored, id, instrumentId, createdById }),
    );
    return toCalibration(row);
  }

  /** @throws 404 where there is no such calibration, or it has no certificate */
  async certificate(id: string): Promise<StoredCertificate> {
    const row = await this.repository.calibration(id);
    if (row === undefined) throw noSuchCalibration();
    const {
      certificateKey: key,
      certificateName: name,
      certificateSize: size,
      certificateSha256: sha256,
    } = row;
    if (key === null || name === null || size === null || sha256 === null) {
      throw problem(404, 'no-certificate', 'No certificate was given with this calibration');
    }
    return { stream: await this.storage.read(key), name, size, sha256, contentType: contentTypeOf(key) };
  }

  /** @throws 404, 409 once an issued report refers to it */
  async delete(id: string): Promise<void> {
    const row = await this.repository.calibration(id);
    if (row === undefined) throw noSuchCalibration();
    try {
      await this.database.transaction((tx) => this.repository.deleteCalibration(tx, id));
    } catch (error) {
      if (!isReferredViolation(error)) throw error;
      const detail =
        'An issued report refers to this calibration, so it stays on record; enter the right one beside it';
      throw problem(409, 'calibration-in-report', detail);
    }
    await this.storage.deleteAll(calibrationPrefix(row.id));
  }

  private async store(id: string, { name, bytes }: CertificateFile) {
    const kind = certificateKind(bytes);
    if (kind === undefined) {
      throw unfit('certificate', 'The certificate is neither PDF nor PNG nor JPEG; save it as one of them');
    }
    if (bytes.length > maxCertificateBytes) throw certificateTooLarge();
    const key = certificateKey(id, kind.ending);
    await this.storage.put(key, bytes);
    return {
      certificateKey: key,
      certificateName: name.replace(/\p{Cc}/gu, '').slice(-maxNameLength) || `certificate.${kind.ending}`,
      certificateSize: bytes.length,
      certificateSha256: createHash('sha256').update(bytes).digest('hex'),
    };
  }

  private async demandInstrument(id: string): Promise<void> {
    if ((await this.repository.record(id, dayOf(new Date()))) === undefined) throw noSuchInstrument();
  }
}

export function certificateTooLarge() {
  const mebibytes = maxCertificateBytes / 1024 / 1024;
  const message = `The certificate is larger than ${mebibytes} MiB; save it smaller`;
  return problem(413, 'certificate-too-large', message, [{ path: 'certificate', message }]);
}

function unfit(path: string, message: string) {
  return problem(422, 'unfit-calibration', message, [{ path, message }]);
}

function noSuchCalibration() {
  return problem(404, 'not-found', 'There is no such calibration');
}
