import { reportSchema, reportTwinSchema, studySchema, type Report, type Study } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { execFile } from 'node:child_process';
import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import { parse } from 'papaparse';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { newDraft, newIssued, newJudged, type Judged } from './support/judged-reports.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const run = promisify(execFile);

let test: TestApp;
let folder: string;
let judged: Judged;

beforeAll(async () => {
  test = await startTestApp();
  folder = await mkdtemp(join(tmpdir(), 'overtally-study-'));
  judged = await newJudged(test);
});
afterAll(async () => {
  await rm(folder, { recursive: true });
  await test.close();
});

const lowPass = (timeConstantS: number) => ({
  ...{ name: 'Choke and burden', isOn: true },
  spec: { kind: 'circuit', circuit: 'first-order-low-pass', values: { timeConstantS } },
  tolerances: [{ parameter: 'timeConstantS', tolerancePercent: 5 }],
});

const definition = (timeConstantS = 0.002) => ({
  input: { kind: 'channel', analysisId: judged.analysisId, channel: 0 },
  ...{ inputQuantity: 'current', inputUnit: 'A', outputQuantity: 'current', outputUnit: 'A' },
  stages: [lowPass(timeConstantS)],
  judgement: { limitSetId: 'iec61000-3-2.classA', parameters: {}, decisionRule: 'simple-acceptance' },
  ...{ spread: { method: 'corners' }, assumptions: 'The load draws what it drew on the bench' },
});

async function newStudy(name = 'Choke for DM-4'): Promise<Study> {
  const analyst = await test.signIn('analyst');
  const body = { name, definition: definition() };
  const reply = await analyst.post(`/api/projects/${test.project.id}/studies`).send(body).expect(201);
  return studySchema.parse(reply.body);
}

async function fileOf(report: Report, form: 'pdf' | 'json' | 'csv'): Promise<Buffer> {
  const analyst = await test.signIn('analyst');
  const reply = await analyst.get(`/api/reports/${report.id}/${form}`).responseType('blob').expect(200);
  return reply.body as Buffer;
}

async function textOf(pdf: Buffer): Promise<string> {
  const file = join(folder, 'report.pdf');
  await writeFile(file, pdf);
  const { stdout } = await run('pdftotext', ['-layout', file, '-']);
  return stdout.replaceAll('\u00a0', ' ');
}

/** The value in amperes of a printed figure such as "170.1 mA". */
function amperes(figure: string): number {
  const [, value, prefix] = /^([\d.]+) ?([mµ]?)A?$/.exec(figure)!;
  return Number(value) * { '': 1, m: 1e-3, µ: 1e-6 }[prefix as '' | 'm' | 'µ'];
}

describe('a study in a report', () => {
  it('stays what it was when the report was submitted, and cannot be deleted once it is issued', async () => {
    const study = await newStudy();
    const report = await newIssued(test, [judged.verdict.id], { studyVersionIds: [study.versionId] });
    expect(report.content.studies).toMatchObject([
      { id: study.id, versionId: study.versionId, number: study.number, version: 1, result: study.result },
    ]);
    const analyst = await test.signIn('analyst');
    const change = { definition: definition(0.005), basedOn: 1 };
    await analyst.post(`/api/studies/${study.id}/versions`).send(change).expect(201);
    await analyst.patch(`/api/studies/${study.id}`).send({ name: 'Renamed' }).expect(200);
    const again = reportSchema.parse((await analyst.get(`/api/reports/${report.id}`).expect(200)).body);
    expect(again.content.studies).toEqual(report.content.studies);
    const refused = await analyst.delete(`/api/studies/${study.id}`).expect(409);
    expect(refused.body).toMatchObject({
      code: 'in-issued-report',
      detail: expect.stringContaining('retire'),
    });
    await expect(
      test.database.delete(schema.reportStudies).where(eq(schema.reportStudies.reportId, report.id)),
    ).rejects.toMatchObject({ cause: { code: '23001' } });
  });

  it('is held by a draft too, which says the cure', async () => {
    const study = await newStudy('Held by a draft');
    const draft = await newDraft(test, [], { studyVersionIds: [study.versionId] });
    const analyst = await test.signIn('analyst');
    expect((await analyst.delete(`/api/studies/${study.id}`).expect(409)).body.code).toBe('in-report');
    const nothing = await analyst.patch(`/api/reports/${draft.id}`).send({ studyVersionIds: [] }).expect(422);
    expect(nothing.body.code).toBe('nothing-to-report');
    await analyst.delete(`/api/reports/${draft.id}`).expect(204);
    await analyst.delete(`/api/studies/${study.id}`).expect(204);
  });

  it('is one of the project, and a report needs something to say', async () => {
    const analyst = await test.signIn('analyst');
    const post = (given: object) =>
      analyst.post(`/api/projects/${test.project.id}/reports`).send({ title: 'Report', ...given });
    const unknown = await post({ studyVersionIds: [judged.verdict.id] }).expect(422);
    expect(unknown.body.errors).toMatchObject([{ path: 'studyVersionIds.0' }]);
    expect((await post({}).expect(422)).body.code).toBe('nothing-to-report');
  });

  it('is printed as a prediction with the numbers of the API, and told apart in the twin', async () => {
    const study = await newStudy('Printed');
    const report = await newIssued(test, [], { studyVersionIds: [study.versionId] });
    const text = await textOf(await fileOf(report, 'pdf'));
    expect(text).toContain('Prediction, not a measurement');
    expect(text).toContain('No recording is judged in this report; it shows predictions alone.');
    expect(text).toContain('The load draws what it drew on the bench');
    expect(text).toContain('± 5 %');
    const amount = '[\\d.]+ [mµ]?A|0 A|0';
    const rows = new Map(
      [
        ...text.matchAll(
          new RegExp(`^ +(\\d+) +(${amount}) +(${amount}) +([\\d.]+|–) +(${amount}|–) `, 'gm'),
        ),
      ].map(([, order, before, behind, gain, limit]) => [Number(order), { before, behind, gain, limit }]),
    );
    const limits = new Map(study.result.verdictAfter!.orders.map(({ order, limit }) => [order, limit]));
    for (const { order, inputRms, outputRms, gain } of study.result.orders.filter(
      (each) => each.inputRms > 0,
    )) {
      const row = rows.get(order)!;
      expect(amperes(row.before!) / inputRms).toBeCloseTo(1, 3);
      expect(amperes(row.behind!) / outputRms).toBeCloseTo(1, 3);
      expect(Number(row.gain) / gain!).toBeCloseTo(1, 3);
      const limit = limits.get(order);
      if (limit) expect(amperes(row.limit!) / limit).toBeCloseTo(1, 3);
    }
    const twin = reportTwinSchema.parse(JSON.parse((await fileOf(report, 'json')).toString()));
    expect(twin.content.studies[0]!.result).toEqual(study.result);
    const csv = (await fileOf(report, 'csv')).toString().replace(/^\ufeff/, '');
    const { data } = parse<Record<string, string>>(csv, { header: true, skipEmptyLines: true });
    expect(data).toHaveLength(study.result.orders.length);
    data.forEach((row, index) => {
      const { order, outputRms } = study.result.orders[index]!;
      expect(row).toMatchObject({
        basis: 'predicted',
        recording: study.number,
        order_or_total: String(order),
      });
      expect(Number(row.value)).toBe(outputRms);
    });
  });
});
