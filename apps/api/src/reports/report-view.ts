import type { Report, ReportContent, ReportEvent, ReportListItem } from '@overtally/contracts';
import { worstResult } from './report-state.js';
import type { ReportEventRow, ReportRow } from './reports.repository.js';

/** Number of a report as people write it: HR-0001. */
export const reportNumber = (number: number): string => `HR-${String(number).padStart(4, '0')}`;

type Head = Omit<ReportListItem, 'result' | 'sections'>;

function toHead(row: Omit<ReportRow, 'content'>): Head {
  return {
    id: row.id,
    projectId: row.projectId,
    number: row.number === null ? null : reportNumber(row.number),
    revision: row.revision,
    title: row.title,
    summary: row.summary,
    deviations: row.deviations,
    replaces: row.replaces,
    replacedBy: row.replacedBy,
    overdueReason: row.overdueReason,
    status: row.status,
    preparedBy: { id: row.preparedById, name: row.preparerName },
    issuedBy:
      row.issuedById === null || row.issuerName === null
        ? null
        : { id: row.issuedById, name: row.issuerName },
    issuedAt: row.issuedAt?.toISOString() ?? null,
    pdfSha256: row.pdfSha256,
    jsonSha256: row.jsonSha256,
    csvSha256: row.csvSha256,
    checkCode: row.checkCode,
    createdAt: row.createdAt.toISOString(),
    updatedAt: row.updatedAt.toISOString(),
  };
}

export const toListItem = (row: Omit<ReportRow, 'content'>): ReportListItem => ({
  ...toHead(row),
  result: worstResult(row.results),
  sections: row.results.length,
});

export const toReport = (row: ReportRow, content: ReportContent, events: ReportEventRow[]): Report => ({
  ...toHead(row),
  recipients: row.recipients,
  verdictIds: row.verdictIds,
  content,
  events: events.map(toEvent),
});

const toEvent = ({ kind, byId, byName, at, comment }: ReportEventRow): ReportEvent => ({
  kind,
  by: { id: byId, name: byName },
  at: at.toISOString(),
  comment,
});
