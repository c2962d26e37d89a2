import { Inject, Injectable } from '@nestjs/common';
import type { UploadLimits } from '@overtally/contracts';
import { schema, type Database, type Tx } from '@overtally/db';
import { eq, sql } from 'drizzle-orm';
import { problem, type ProblemException } from '../../common/problem.js';
import { AppConfig } from '../../config/app-config.js';
import { DATABASE } from '../../database/database.tokens.js';
import { bytesInWords } from './bytes-in-words.js';

const { projects, recordings } = schema;

/** How large a file may be, and how much a project may hold. */
@Injectable()
export class UploadLimitsService {
  constructor(
    @Inject(DATABASE) private readonly database: Database,
    private readonly config: AppConfig,
  ) {}

  async of(projectId: string): Promise<UploadLimits> {
    return {
      maxFileBytes: this.config.maxUploadBytes,
      quotaBytes: this.config.projectQuotaBytes,
      usedBytes: await usedBytes(this.database, projectId),
    };
  }

  /**
   * Refuses a file that may not come into the project.
   * @throws ProblemException 413 `file-too-large` or `quota-exceeded`, with the figures
   */
  async admit(projectId: string, sizeBytes: number): Promise<void> {
    const { maxFileBytes, quotaBytes, usedBytes } = await this.of(projectId);
    if (sizeBytes > maxFileBytes) throw fileTooLarge(maxFileBytes, sizeBytes);
    if (quotaBytes !== null && usedBytes + sizeBytes > quotaBytes)
      throw quotaExceeded(quotaBytes, usedBytes, sizeBytes);
  }

  /** The same within the transaction that brings a new source in; the project is held so that two cannot pass together. */
  async admitSource(tx: Tx, projectId: string, sizeBytes: number): Promise<void> {
    const quota = this.config.projectQuotaBytes;
    if (quota === null) return;
    await tx.select({ id: projects.id }).from(projects).where(eq(projects.id, projectId)).for('update');
    const used = await usedBytes(tx, projectId);
    if (used + sizeBytes > quota) throw quotaExceeded(quota, used, sizeBytes);
  }
}

/** Sources are kept once per project and content, so what several recordings share counts once. */
async function usedBytes(database: Database | Tx, projectId: string): Promise<number> {
  const sources = database
    .selectDistinct({ key: recordings.sourceKey, size: recordings.fileSize })
    .from(recordings)
    .where(eq(recordings.projectId, projectId))
    .as('sources');
  const [row] = await database
    .select({ bytes: sql<string>`coalesce(sum(${sources.size}), 0)` })
    .from(sources);
  return Number(row?.bytes ?? 0);
}

/** @param size that of the file, where it is known */
export function fileTooLarge(limit: number, size?: number): ProblemException {
  const most = `the limit of this installation, ${bytesInWords(limit)} (${limit} bytes)`;
  const what = size === undefined ? 'The file' : `The file has ${bytesInWords(size)} (${size} bytes); it`;
  return problem(
    413,
    'file-too-large',
    `${what} is larger than ${most}. Cut the capture, or have the limit raised (MAX_UPLOAD_MB)`,
  );
}

/** @param size that of the file, where it is known */
export function quotaExceeded(quota: number, used: number, size?: number): ProblemException {
  const file = size === undefined ? 'the file' : `the file has ${bytesInWords(size)} (${size} bytes)`;
  const full = `The project holds ${bytesInWords(used)} (${used} bytes) of the ${bytesInWords(quota)} (${quota} bytes) it may hold`;
  return problem(
    413,
    'quota-exceeded',
    `${full}, and ${file}${size === undefined ? ' does not fit' : ''}. Delete recordings that are no longer needed, or have the quota raised (PROJECT_QUOTA_MB)`,
  );
}
