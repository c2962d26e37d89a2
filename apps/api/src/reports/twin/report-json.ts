import { reportTwinFormat, reportTwinVersion, type Report, type ReportTwin } from '@overtally/contracts';

/**
 * The report as data (`reportTwinSchema`), in UTF-8: its head and all its content, figures in full.
 *
 * Keys stand in the order of their names, so that the same report gives the same bytes wherever it was kept.
 */
export function reportJson(report: Report, checkUrl: string | null): Uint8Array {
  const { id, number, revision, status, title, summary, deviations, overdueReason } = report;
  const { preparedBy, issuedBy, issuedAt, checkCode, events, content } = report;
  const twin: ReportTwin = {
    format: reportTwinFormat,
    formatVersion: reportTwinVersion,
    ...{ id, number, revision, status, title, summary, deviations, overdueReason },
    ...{ preparedBy, issuedBy, issuedAt, checkCode, checkUrl },
    replacesRevision: report.replaces?.revision ?? null,
    ...{ events, content },
  };
  return Buffer.from(`${JSON.stringify(twin, sortedKeys, 2)}\n`);
}

/** A database hands JSON objects back with their keys in an order of its own. */
function sortedKeys(_key: string, value: unknown): unknown {
  if (value === null || typeof value !== 'object' || Array.isArray(value)) return value;
  return Object.fromEntries(Object.entries(value).sort(([one], [other]) => (one < other ? -1 : 1)));
}
