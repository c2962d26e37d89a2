import { Injectable } from '@nestjs/common';
import { createHash } from 'node:crypto';
import { problem } from '../common/problem.js';
import { Storage } from '../storage/storage.js';
import { ReportRendering } from './rendering/report-rendering.service.js';
import { reportNumber } from './report-number.js';
import { ReportsRepository } from './reports.repository.js';
import { ReportsService } from './reports.service.js';

export interface ReportPdf {
  bytes: Uint8Array;
  fileName: string;
  /** Null for a draft, whose bytes may differ next time. */
  sha256: string | null;
}

/** A report as PDF: an issued one byte for byte as stored, any other drawn anew from what it says. */
@Injectable()
export class ReportPdfService {
  constructor(
    private readonly repository: ReportsRepository,
    private readonly reports: ReportsService,
    private readonly storage: Storage,
    private readonly rendering: ReportRendering,
  ) {}

  async get(id: string): Promise<ReportPdf> {
    const row = await this.repository.find(id);
    if (row?.pdfKey && row.pdfSha256 && row.number !== null) {
      return {
        bytes: await this.stored(row.pdfKey, row.pdfSha256),
        fileName: `${reportNumber(row.number)}-revision-${row.revision}.pdf`,
        sha256: row.pdfSha256,
      };
    }
    const { pdf } = await this.rendering.forms(await this.reports.get(id), ['pdf']);
    return { bytes: pdf, fileName: 'draft.pdf', sha256: null };
  }

  private async stored(key: string, sha256: string): Promise<Uint8Array> {
    const bytes = await this.storage.readBytes(key);
    if (createHash('sha256').update(bytes).digest('hex') === sha256) return bytes;
    const detail = 'The stored PDF is not the one that was issued; restore it from a backup';
    throw problem(500, 'pdf-damaged', detail);
  }
}
