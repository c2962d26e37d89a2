import { Injectable } from '@nestjs/common';
import type { ReportCheck } from '@overtally/contracts';
import { problem } from '../common/problem.js';
import { parsedCheckCode } from '../reports/check-code.js';
import { ReportCheckLimits } from './report-check-limits.js';
import { ReportChecksRepository } from './report-checks.repository.js';
import { parsedReportNumber, reportNumber } from '../reports/report-number.js';

/** Tells anybody who holds a printed report whether it is one that was issued, and whether it still counts. */
@Injectable()
export class ReportChecksService {
  constructor(
    private readonly repository: ReportChecksRepository,
    private readonly limits: ReportCheckLimits,
  ) {}

  /**
   * What is known of the revision that number and code were printed on.
   * @param address who asks
   * @throws 404, the same one whatever of the two is wrong; 429 for an address that asks too often
   */
  async check(numberText: string, codeText: string, address: string): Promise<ReportCheck> {
    await this.limits.count(address);
    const number = parsedReportNumber(numberText);
    const code = parsedCheckCode(codeText);
    const row = number !== null && code !== null ? await this.repository.find(number, code) : undefined;
    if (number === null || !row?.issuedAt || row.pdfSha256 === null) throw unknown();
    const newest = row.status === 'superseded' ? await this.repository.newest(row.projectId, number) : null;
    return {
      number: reportNumber(number),
      revision: row.revision,
      issuedAt: row.issuedAt.toISOString(),
      state: row.status === 'superseded' ? 'superseded' : 'current',
      newest: newest?.issuedAt
        ? { revision: newest.revision, issuedAt: newest.issuedAt.toISOString() }
        : null,
      pdfSha256: row.pdfSha256,
    };
  }
}

function unknown() {
  const detail =
    'No report was issued under this number and code; compare both with the printed report, and if they agree ask the laboratory';
  return problem(404, 'report-unknown', detail);
}
