import { reportTwinSchema, type Report, type Verdict } from '@overtally/contracts';
import { execFile } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtemp, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { AppConfig } from '../dist/config/app-config.js';
import { newDraft, newInReview, newIssued, newJudged, type Judged } from './support/judged-reports.js';
import { newNote } from './support/project-contents.js';
import { dimmerChannel } from './support/report-example.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const run = promisify(execFile);

let test: TestApp;
let folder: string;
let judged: Judged;

beforeAll(async () => {
  test = await startTestApp();
  folder = await mkdtemp(join(tmpdir(), 'overtally-pdf-'));
  const message = 'Two windows left out: supply dip';
  const flags = [{ code: 'dip', severity: 'warning' as const, message, evidence: null }];
  judged = await newJudged(test, dimmerChannel({ flags }), {
    ...{ name: 'Bench dimmer, 40 % setting', eut: 'DM-4 dimmer, no. 0031', fileName: 'dimmer-40.csv' },
    fileSha256: createHash('sha256').update('dimmer').digest('hex'),
  });
  await newNote(test.database, judged.analysisId, {
    projectId: test.project.id,
    userId: test.people.analyst.id,
  });
});
afterAll(async () => {
  await rm(folder, { recursive: true });
  await test.close();
});

async function pdfOf(report: Report): Promise<Buffer> {
  const technician = await test.signIn('technician');
  const reply = await technician.get(`/api/reports/${report.id}/pdf`).responseType('blob').expect(200);
  expect(reply.headers['content-type']).toBe('application/pdf');
  return reply.body as Buffer;
}

/** What poppler reads of a PDF: its pages as text, as laid out, spaces made plain. */
async function pagesOf(pdf: Buffer): Promise<string[]> {
  const file = join(folder, 'report.pdf');
  await writeFile(file, pdf);
  const { stdout } = await run('pdftotext', ['-layout', file, '-']);
  return stdout.replaceAll('\u00a0', ' ').split('\f').slice(0, -1);
}

async function poppler(tool: string, pdf: Buffer): Promise<string> {
  const file = join(folder, 'looked-at.pdf');
  await writeFile(file, pdf);
  return (await run(tool, [file])).stdout;
}

/** The value in amperes of a printed figure such as "170.1 mA". */
function amperes(figure: string): number {
  const [, sign, value, prefix] = /^(−?)([\d.]+) ([mµ]?)A$/.exec(figure)!;
  return (sign ? -1 : 1) * Number(value) * { '': 1, m: 1e-3, µ: 1e-6 }[prefix as '' | 'm' | 'µ'];
}

const amount = '[−\\d.]+ [mµ]?A';
const rowForm = new RegExp(
  `^ +(\\d+) +(${amount}) +([<\\d. ]+ %) +(${amount}) +(${amount}) +(${amount}) +([\\d.]+ %) +(.+)$`,
);

/** Columns of one row of the order table: order, value, of fundamental, highest, limit, margin, share, result. */
function rowOf(pages: string[], order: number): string[] {
  const rows = pages.flatMap((page) => page.split('\n').map((line) => rowForm.exec(line)?.slice(1) ?? []));
  return rows.find(([first]) => first === String(order)) ?? [];
}

describe('the PDF of an issued report', () => {
  it('is what was stored when it was issued, and carries its SHA-256 as the ETag', async () => {
    const report = await newIssued(test, [judged.verdict.id]);
    const pdf = await pdfOf(report);
    const sha256 = createHash('sha256').update(pdf).digest('hex');
    expect(report.pdfSha256).toBe(sha256);
    expect(await pdfOf(report)).toEqual(pdf);
    const guest = await test.signIn('guest');
    const path = `/api/reports/${report.id}/pdf`;
    const { headers } = await guest.get(path).set('If-None-Match', `"${sha256}"`).expect(304);
    expect(headers.etag).toBe(`"${sha256}"`);
  });

  it('prints the numbers that the API gives', async () => {
    const report = await newIssued(test, [judged.verdict.id]);
    const pages = await pagesOf(await pdfOf(report));
    const { verdict } = report.content.sections[0]!;
    expect(verdict.orders.length).toBeGreaterThan(38);
    for (const entry of verdict.orders) expectRow(rowOf(pages, entry.order), entry);
  });

  it('says who, what and from which bytes', async () => {
    const report = await newIssued(test, [judged.verdict.id], { summary: 'Measured at three settings.' });
    const pages = await pagesOf(await pdfOf(report));
    const all = pages.join('\n');
    const { recording, verdict } = report.content.sections[0]!;
    for (const words of [report.number!, 'Measured at three settings.', 'Prepared by', 'Issued by']) {
      expect(pages[0]).toContain(words);
    }
    for (const words of [recording.file.sha256, 'dimmer-40.csv', 'DM-4 dimmer, no. 0031', '50.00 kHz']) {
      expect(all).toContain(words);
    }
    for (const words of [
      verdict.limitSet.tableRef,
      'Two windows left out',
      'Six-pulse',
      'not a certificate',
    ]) {
      expect(all).toContain(words);
    }
    pages.forEach((page, index) => {
      expect(page).toContain(`page ${index + 1} of ${pages.length}`);
      expect(page).toContain(`${report.number}, revision 0`);
      expect(page).not.toContain('DRAFT');
    });
  });

  it('is tagged, and carries its own fonts', async () => {
    const pdf = await pdfOf(await newIssued(test, [judged.verdict.id]));
    expect(await poppler('pdfinfo', pdf)).toMatch(/Tagged: +yes/);
    const fonts = (await poppler('pdffonts', pdf)).split('\n').slice(2).filter(Boolean);
    expect(fonts.length).toBeGreaterThan(0);
    for (const line of fonts) expect(line).toMatch(/IBMPlex.* yes yes yes /);
  });

  it('is not handed out once the stored bytes are missing, or not those that were issued', async () => {
    const report = await newIssued(test, [judged.verdict.id]);
    const { dataDir } = test.app.get(AppConfig);
    const stored = (await readdir(dataDir, { recursive: true })).find(
      (path) => path.includes(report.id) && path.endsWith('.pdf'),
    );
    const guest = await test.signIn('guest');
    const answer = async () => (await guest.get(`/api/reports/${report.id}/pdf`).expect(500)).body;
    await writeFile(join(dataDir, stored!), 'something else');
    expect((await answer()).code).toBe('pdf-damaged');
    await rm(join(dataDir, stored!));
    expect((await answer()).code).toBe('stored-file-missing');
  });
});

describe('the machine-readable twin of a report', () => {
  const twinOf = async (report: Report, form: 'json' | 'csv', who: 'technician' | 'guest' = 'technician') =>
    (await test.signIn(who)).get(`/api/reports/${report.id}/${form}`).responseType('blob');

  it('is kept as issued, byte for byte, with its SHA-256 as the ETag', async () => {
    const report = await newIssued(test, [judged.verdict.id]);
    for (const form of ['json', 'csv'] as const) {
      const reply = await twinOf(report, form, 'guest');
      const sha256 = createHash('sha256')
        .update(reply.body as Buffer)
        .digest('hex');
      expect(reply.status).toBe(200);
      expect(sha256).toBe(report[`${form}Sha256`]);
      expect(reply.headers.etag).toBe(`"${sha256}"`);
      expect(reply.headers['content-disposition']).toContain(`${report.number}-revision-0.${form}`);
    }
  });

  it('has the content that the API gives, and the address of the check page', async () => {
    const report = await newIssued(test, [judged.verdict.id]);
    const twin = reportTwinSchema.parse(JSON.parse(String((await twinOf(report, 'json')).body)));
    expect(twin.content).toEqual(report.content);
    expect(twin.checkUrl).toMatch(new RegExp(`/check/${report.number}/${report.checkCode}$`));
  });

  it('follows a draft, which guests do not see', async () => {
    const draft = await newDraft(test, [judged.verdict.id]);
    const reply = await twinOf(draft, 'csv');
    expect(reply.headers['cache-control']).toBe('no-store');
    expect(String(reply.body).split('\r\n')).toHaveLength(
      2 + judged.verdict.orders.length + judged.verdict.totals.length,
    );
    expect((await twinOf(draft, 'json', 'guest')).status).toBe(404);
  });
});

describe('the PDF of any other report', () => {
  it('is marked DRAFT on each page and follows every change', async () => {
    for (const report of [
      await newDraft(test, [judged.verdict.id]),
      await newInReview(test, [judged.verdict.id], { title: 'Held for review' }),
    ]) {
      const pages = await pagesOf(await pdfOf(report));
      expect(pages.length).toBeGreaterThan(2);
      for (const page of pages) expect(page).toContain('DRAFT');
      expect(pages[0]).toContain(report.title);
    }
  });
});

function expectRow(row: string[], entry: Verdict['orders'][number]): void {
  const [order, value, , highest, limit, margin, share, result] = row;
  expect(Number(order)).toBe(entry.order);
  // Four significant digits: half of the last place is at most 0.05 % of the value.
  for (const [printed, exact] of [
    [value, entry.mean],
    [highest, entry.smoothedMax],
    [limit, entry.limit],
    [margin, entry.margin],
  ] as const) {
    expect(Math.abs(amperes(printed!) - exact!)).toBeLessThanOrEqual(0.0005 * Math.abs(exact!));
  }
  expect(Math.abs(parseFloat(share!) - entry.sharePercent!)).toBeLessThanOrEqual(0.05);
  expect(result).toBe({ fail: 'over', pass: 'within', disregarded: 'disregarded' }[entry.result as 'fail']);
}
