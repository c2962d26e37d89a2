import {
  reportCheckPath,
  type ProjectRole,
  type Report,
  type ReportCaution,
  type ReportContent,
  type ReportEvent,
  type ReportListItem,
} from '@overtally/contracts';
import { reportNumber } from './report-number.js';
import { settled, worstResult } from './report-state.js';
import type { ReportEventRow, ReportRow } from './reports.repository.js';

type Head = Omit<ReportListItem, 'result' | 'sections'>;

/**
 * What a list and a page say of a report alike.
 * @param publicUrl address of the installation, for that of the check page
 */
function toHead(row: Omit<ReportRow, 'content'>, publicUrl: string): Head {
  const number = row.number === null ? null : reportNumber(row.number);
  return {
    id: row.id,
    projectId: row.projectId,
    number,
    revision: row.revision,
    title: row.title,
    summary: row.summary,
    deviations: row.deviations,
    replaces: row.replaces,
    replacedBy: row.replacedBy,
    overdueReason: row.overdueReason,
    revisionReason: row.revisionReason,
    status: row.status,
    returned: returnedOf(row),
    preparedBy: { id: row.preparedById, name: row.preparerName },
    issuedBy:
      row.issuedById === null || row.issuerName === null
        ? null
        : { id: row.issuedById, name: row.issuerName },
    submittedBy: row.submittedBy,
    issuedAt: row.issuedAt?.toISOString() ?? null,
    isIssuedByPreparer: row.issuedById !== null && isPreparer(row, row.issuedById),
    pdfSha256: row.pdfSha256,
    jsonSha256: row.jsonSha256,
    csvSha256: row.csvSha256,
    checkCode: row.checkCode,
    checkUrl: number && row.checkCode ? `${publicUrl}${reportCheckPath(number, row.checkCode)}` : null,
    createdAt: row.createdAt.toISOString(),
    updatedAt: row.updatedAt.toISOString(),
  };
}

export const toListItem = (row: Omit<ReportRow, 'content'>, publicUrl: string): ReportListItem => ({
  ...toHead(row, publicUrl),
  result: worstResult(row.results),
  sections: row.results.length,
});

/** What a report says beside its row. */
interface Parts {
  content: ReportContent;
  cautions: ReportCaution[];
  events: ReportEventRow[];
}

export const toReport = (row: ReportRow, parts: Parts, publicUrl: string): Report => ({
  ...toHead(row, publicUrl),
  recipients: row.recipients,
  verdictIds: row.verdictIds,
  studyVersionIds: row.studyVersionIds,
  content: parts.content,
  cautions: parts.cautions,
  events: parts.events.map(toEvent),
});

const toEvent = ({ kind, byId, byName, at, comment }: ReportEventRow): ReportEvent => ({
  kind,
  by: { id: byId, name: byName },
  at: at.toISOString(),
  comment,
});

type Preparers = { preparedById: string; submittedBy: { id: string } | null };

/** Whether a person had the report in hand before its review: who prepared it, or who submitted it last. */
export const isPreparer = ({ preparedById, submittedBy }: Preparers, personId: string): boolean =>
  personId === preparedById || personId === submittedBy?.id;

function returnedOf({ status, lastStep }: Omit<ReportRow, 'content'>): Report['returned'] {
  if (status !== 'draft' || lastStep?.kind !== 'returned') return null;
  const { by, at, comment } = lastStep;
  return { by, at: new Date(at).toISOString(), comment };
}

/**
 * What of a report a person of the role is shown. Guests read for the customer: comments within the laboratory
 * and a revision that is not issued yet are not for them.
 */
export function asSeenBy<T extends Pick<Report, 'replacedBy'> & { events?: ReportEvent[] }>(
  role: ProjectRole | null,
  report: T,
): T {
  if (role !== 'guest') return report;
  const { replacedBy, events } = report;
  return {
    ...report,
    replacedBy: replacedBy && settled.includes(replacedBy.status) ? replacedBy : null,
    ...(events && { events: events.filter(({ kind }) => kind !== 'commented') }),
  };
}
