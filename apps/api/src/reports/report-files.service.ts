import { Injectable } from '@nestjs/common';
import { createHash } from 'node:crypto';
import { problem } from '../common/problem.js';
import { isComputeStopped } from '../jobs/compute-task.js';
import { Storage } from '../storage/storage.js';
import { ReportRendering } from './rendering/report-rendering.service.js';
import type { ReportForm } from './rendering/report-task.js';
import { reportNumber } from './report-number.js';
import { ReportsRepository, type ReportRow } from './reports.repository.js';
import { ReportsService } from './reports.service.js';

export interface ReportFile {
  bytes: Uint8Array;
  fileName: string;
  /** Null for a draft, whose bytes may differ next time. */
  sha256: string | null;
}

interface Kept {
  key: string;
  sha256: string;
}

/** The files of a report: of an issued one byte for byte as stored, of any other drawn anew from what it says. */
@Injectable()
export class ReportFiles {
  constructor(
    private readonly repository: ReportsRepository,
    private readonly reports: ReportsService,
    private readonly storage: Storage,
    private readonly rendering: ReportRendering,
  ) {}

  /** @throws the reason of `stop` once it is raised, 404 for data of a report that was issued before there was any */
  async get(id: string, form: ReportForm, stop: AbortSignal): Promise<ReportFile> {
    const row = await this.repository.find(id);
    const kept = row && keptFile(row, form);
    if (kept) {
      const { key, sha256 } = kept;
      const fileName = `${reportNumber(row.number ?? 0)}-revision-${row.revision}.${form}`;
      return { bytes: await this.stored(key, sha256, form), fileName, sha256 };
    }
    if (row?.pdfKey) {
      const detail = 'This report was issued before reports were kept as data; its PDF is there';
      throw problem(404, 'no-report-data', detail);
    }
    return { bytes: await this.drawn(id, form, stop), fileName: `draft.${form}`, sha256: null };
  }

  private async drawn(id: string, form: ReportForm, stop: AbortSignal): Promise<Uint8Array> {
    try {
      return (await this.rendering.forms(await this.reports.get(id), [form], stop))[form];
    } catch (error) {
      if (isComputeStopped(error)) stop.throwIfAborted();
      throw error;
    }
  }

  private async stored(key: string, sha256: string, form: ReportForm): Promise<Uint8Array> {
    const bytes = await this.storage.readBytes(key);
    if (createHash('sha256').update(bytes).digest('hex') === sha256) return bytes;
    const detail = `The stored ${form.toUpperCase()} is not the one that was issued; restore it from a backup`;
    throw problem(500, `${form}-damaged`, detail);
  }
}

function keptFile(row: ReportRow, form: ReportForm): Kept | undefined {
  const kept = {
    pdf: { key: row.pdfKey, sha256: row.pdfSha256 },
    json: { key: row.jsonKey, sha256: row.jsonSha256 },
    csv: { key: row.csvKey, sha256: row.csvSha256 },
  }[form];
  return kept.key !== null && kept.sha256 !== null ? { key: kept.key, sha256: kept.sha256 } : undefined;
}
