import type { OrderVerdict, Report, ReportSection, ReportStudy, TotalVerdict } from '@overtally/contracts';

const columns = [
  'report',
  'revision',
  'section',
  'recording',
  'channel',
  'kind',
  'order_or_total',
  'frequency_hz',
  'value',
  'unit',
  'expanded_uncertainty_k2',
  'limit',
  'margin',
  'share_percent',
  'highest_smoothed_value',
  'result',
  'reason',
  'basis',
] as const;

type Row = Record<(typeof columns)[number], string | number | null>;

/**
 * The judged orders and totals of all sections, and the orders of all studies behind their stages, as CSV (RFC 4180, UTF-8
 * with byte order mark): one row each, figures in full with a decimal point, empty where one does not apply. The column
 * `basis` says whether a row is measured or predicted; a study stands in `recording` by its number.
 */
export function reportCsv(report: Report): Uint8Array {
  const { sections, studies } = report.content;
  const rows = [
    ...sections.flatMap((section, index) => sectionRows(report, section, index + 1)),
    ...studies.flatMap((study, index) => studyRows(report, study, sections.length + index + 1)),
  ];
  const lines = [columns.join(','), ...rows.map((row) => columns.map((name) => cell(row[name])).join(','))];
  return Buffer.from(`\ufeff${lines.join('\r\n')}\r\n`);
}

function sectionRows(report: Report, section: ReportSection, number: number): Row[] {
  const { verdict, recording, analysis } = section;
  const frequencies = new Map(analysis.channel.harmonics.map((each) => [each.order, each.frequencyHz]));
  const fundamentalHz = analysis.channel.fundamental?.frequencyHz;
  const place = {
    report: report.number,
    revision: report.revision,
    section: number,
    recording: recording.number,
    channel: verdict.channelName,
    basis: 'measured',
  };
  const orderRow = (entry: OrderVerdict): Row => ({
    ...place,
    kind: 'order',
    order_or_total: entry.order,
    frequency_hz:
      frequencies.get(entry.order) ?? (fundamentalHz === undefined ? null : entry.order * fundamentalHz),
    value: entry.mean,
    unit: verdict.unit,
    expanded_uncertainty_k2: entry.uncertainty,
    limit: entry.limit,
    margin: entry.margin,
    share_percent: entry.sharePercent,
    highest_smoothed_value: entry.smoothedMax,
    result: entry.result,
    reason: entry.reason,
  });
  const totalRow = (total: TotalVerdict): Row => ({
    ...place,
    kind: 'total',
    order_or_total: total.name,
    frequency_hz: null,
    value: total.value,
    unit: total.unit,
    expanded_uncertainty_k2: null,
    limit: total.limit,
    margin: null,
    share_percent: total.sharePercent,
    highest_smoothed_value: null,
    result: total.result,
    reason: total.reason,
  });
  return [...verdict.orders.map(orderRow), ...verdict.totals.map(totalRow)];
}

function studyRows(report: Report, { number, result, outputUnit }: ReportStudy, section: number): Row[] {
  const judged = new Map(result.verdictAfter?.orders.map((entry) => [entry.order, entry]));
  return result.orders.map(({ order, frequencyHz, outputRms }): Row => {
    const entry = judged.get(order);
    return {
      ...{ report: report.number, revision: report.revision, section, recording: number, channel: null },
      ...{
        kind: 'order',
        order_or_total: order,
        frequency_hz: frequencyHz,
        value: outputRms,
        unit: outputUnit,
      },
      ...{ expanded_uncertainty_k2: null, limit: entry?.limit ?? null, margin: entry?.margin ?? null },
      ...{ share_percent: entry?.sharePercent ?? null, highest_smoothed_value: null },
      ...{ result: entry?.result ?? null, reason: entry?.reason ?? null, basis: 'predicted' },
    };
  });
}

/** Signs that make a spreadsheet take a text for a formula. */
const formulaStart = /^[=+\-@\t\r]/;

function cell(value: string | number | null): string {
  if (value === null) return '';
  if (typeof value === 'number') return String(value);
  const text = formulaStart.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}
