import { reportTwinSchema, type Report } from '@overtally/contracts';
import { parse } from 'papaparse';
import { describe, expect, it } from 'vitest';
import { channelWith, exampleReport, exampleSection } from '../../../test/support/report-example.js';
import { reportCsv } from './report-csv.js';
import { reportJson } from './report-json.js';

const textOf = (bytes: Uint8Array): string => new TextDecoder('utf-8', { ignoreBOM: false }).decode(bytes);

const rowsOf = (report: Report) =>
  parse<Record<string, string>>(textOf(reportCsv(report)), { header: true, skipEmptyLines: true }).data;

describe('a report as CSV', () => {
  it('has each order and total of each section, with its numbers in full', () => {
    const sections = [exampleSection({ number: 'R-0001' }), exampleSection({ number: 'R-0002' })];
    const rows = rowsOf(exampleReport(sections));
    const expected = sections.flatMap(({ verdict, recording }, index) => [
      ...verdict.orders.map(({ order, mean, limit, sharePercent, result }) => ({
        ...{ section: index + 1, recording: recording.number, name: order, value: mean },
        ...{ limit, sharePercent, result },
      })),
      ...verdict.totals.map(({ name, value, limit, sharePercent, result }) => ({
        ...{ section: index + 1, recording: recording.number, name, value, limit, sharePercent, result },
      })),
    ]);
    const given = (value: number | null): string => (value === null ? '' : String(value));
    expect(rows).toHaveLength(expected.length);
    rows.forEach((row, index) => {
      const { section, recording, name, value, limit, sharePercent, result } = expected[index]!;
      expect(row).toMatchObject({
        ...{ report: 'HR-0001', revision: '0', section: String(section), recording, result },
        order_or_total: String(name),
        value: given(value),
        limit: given(limit),
        share_percent: given(sharePercent),
      });
    });
  });

  it('gives each order its frequency, a multiple of the fundamental', () => {
    for (const row of rowsOf(exampleReport([exampleSection()])).filter(({ kind }) => kind === 'order')) {
      expect(Number(row.frequency_hz)).toBeCloseTo(Number(row.order_or_total) * 49.981, 9);
    }
  });

  it('holds no text that a spreadsheet takes for a formula, and keeps quotes and line ends', () => {
    const name = '=HYPERLINK("http://x";"A1"),\nnext';
    const channel = channelWith([3, 1, 1], { name });
    const [row] = rowsOf(exampleReport([exampleSection({ channel })]));
    expect(row!.channel).toBe(`'${name}`);
  });
});

describe('a report as JSON', () => {
  it('has all that the report says, in the documented form', () => {
    const report = exampleReport([exampleSection()], { checkCode: '7Q2M-K0ZV-1RXA-9D4H' });
    const twin = reportTwinSchema.parse(JSON.parse(textOf(reportJson(report, 'https://x.example/check'))));
    expect(twin.content).toEqual(report.content);
    expect(twin).toMatchObject({
      ...{ format: 'overtally-report', formatVersion: 1, number: 'HR-0001', revision: 0 },
      ...{ checkCode: '7Q2M-K0ZV-1RXA-9D4H', checkUrl: 'https://x.example/check' },
    });
  });

  it('is the same to the last byte whatever the order of keys', () => {
    const report = exampleReport([exampleSection()]);
    const turned = Object.fromEntries(Object.entries(report).reverse()) as Report;
    turned.content = Object.fromEntries(Object.entries(report.content).reverse()) as Report['content'];
    expect(textOf(reportJson(turned, null))).toBe(textOf(reportJson(report, null)));
  });

  it('names no address that the report is sent to', () => {
    const report = exampleReport([exampleSection()], { recipients: [{ name: 'A', email: 'a@x.example' }] });
    expect(textOf(reportJson(report, null))).not.toContain('a@x.example');
  });
});
