import type { Report } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq, sql } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { Storage } from '../dist/storage/storage.js';
import { freezeWith, newBehind, type Behind } from './support/behind-reports.js';
import { newInReview, newJudged, type Judged } from './support/judged-reports.js';
import { newAnalysis, newLimitSet, newNote } from './support/project-contents.js';
import { startTestApp, type TestApp } from './support/test-app.js';

let test: TestApp;
let own: Judged;
let behind: Behind;
let repeat: { id: string };
let note: { id: string };
let limitSet: { id: string };
let issued: Report;

beforeAll(async () => {
  test = await startTestApp();
  const owner = { projectId: test.project.id, userId: test.people.technician.id };
  own = await newJudged(test);
  note = await newNote(test.database, own.analysisId, owner);
  repeat = await newAnalysis(test.database, own.recordingId, owner);
  limitSet = await newLimitSet(test.database, owner);
  behind = await newBehind(test, '2027-02-03');
  const review = await newInReview(test, [own.verdict.id]);
  const { equipment, operatingMode, chain } = behind;
  await freezeWith(test, review, ({ verdict }) => ({
    ...{ equipment, operatingMode, chain },
    verdict: {
      ...verdict,
      limitSetId: limitSet.id,
      repeats: [
        {
          ...{ analysisId: repeat.id, recordingId: own.recordingId, recordingNumber: 'R-0001' },
          ...{ channel: 0, result: 'fail', reason: '' },
        },
      ],
    },
  }));
  const manager = await test.signIn('manager');
  issued = (await manager.post(`/api/reports/${review.id}/issue`).send({}).expect(200)).body;
});
afterAll(() => test.close());

/** The constraint that the database names, or its message, when it refuses. */
const refusal = async (query: Promise<unknown>): Promise<string> =>
  query.then(
    () => 'done',
    ({ cause }: { cause: { constraint?: string; message: string } }) => cause.constraint ?? cause.message,
  );

describe('what an issued report speaks of', () => {
  it('is on record, each thing once', async () => {
    const rows = await test.database
      .select({ kind: schema.reportReferences.kind, id: schema.reportReferences.targetId })
      .from(schema.reportReferences)
      .where(eq(schema.reportReferences.reportId, issued.id));
    const wanted = [
      ['analysis', own.analysisId],
      ['analysis', repeat.id],
      ['calibration', behind.instrument.calibration?.id],
      ['equipment', behind.equipment?.id],
      ['instrument', behind.instrument.id],
      ['limit-set', limitSet.id],
      ['measuring-chain', behind.chain.id],
      ['note', note.id],
      ['operating-mode', behind.operatingMode?.id],
      ['recording', own.recordingId],
    ];
    expect(rows.map(({ kind, id }) => [kind, id]).sort()).toEqual(wanted.sort());
  });

  it('cannot be deleted by anybody who holds a connection', async () => {
    const { recordings, analyses, notes, limitSets, equipment } = schema;
    const { operatingModes, instruments, calibrations, measuringChains } = schema;
    const targets = [
      [recordings, own.recordingId],
      [analyses, own.analysisId],
      [analyses, repeat.id],
      [notes, note.id],
      [limitSets, limitSet.id],
      [equipment, behind.equipment!.id],
      [operatingModes, behind.operatingMode!.id],
      [instruments, behind.instrument.id],
      [calibrations, behind.instrument.calibration!.id],
      [measuringChains, behind.chain.id],
    ] as const;
    const found = [];
    for (const [table, id] of targets) {
      found.push(await refusal(test.database.execute(sql`delete from ${table} where id = ${id}`)));
    }
    expect(found).toEqual(targets.map(() => 'report_references_kept'));
  });

  it('cannot be deleted through the API, which says why', async () => {
    const technician = await test.signIn('technician');
    const analyst = await test.signIn('analyst');
    const manager = await test.signIn('manager');
    const replies = [
      await technician.delete(`/api/recordings/${own.recordingId}`),
      await technician.delete(`/api/notes/${note.id}`),
      await analyst.delete(`/api/limit-sets/${limitSet.id}`),
    ];
    expect(replies.map(({ status }) => status)).toEqual([409, 409, 409]);
    expect(replies[0]!.body).toMatchObject({ code: 'stands-in-issued-report' });
    expect(replies[0]!.body.detail).toContain('stays on record');
    await manager.delete(`/api/reports/${issued.id}`).expect(409);
    const { fileSha256 } = (
      await test.database.select().from(schema.recordings).where(eq(schema.recordings.id, own.recordingId))
    )[0]!;
    expect(issued.content.sections[0]!.recording.file.sha256).toBe(fileSha256);
  });

  it('is not let go of, nor are its steps and verdicts, nor any word or number of the report', async () => {
    const { id } = issued;
    const attempts = [
      sql`delete from report_references where report_id = ${id}`,
      sql`update report_references set kind = 'note' where report_id = ${id}`,
      sql`delete from report_events where report_id = ${id}`,
      sql`update report_events set comment = 'Other' where report_id = ${id}`,
      sql`delete from report_verdicts where report_id = ${id}`,
      sql`update verdicts set result = 'pass' where id = ${own.verdict.id}`,
      sql`update reports set content = '{}' where id = ${id}`,
      sql`update reports set check_code = 'AAAA-AAAA-AAAA-AAAA' where id = ${id}`,
      sql`update reports set csv_sha256 = '0' where id = ${id}`,
      sql`update reports set recipients = '[]' || '[1]'::jsonb where id = ${id}`,
      sql`update reports set overdue_reason = 'None' where id = ${id}`,
      sql`update reports set revision = 7 where id = ${id}`,
      sql`update reports set status = 'in-review' where id = ${id}`,
      sql`delete from reports where id = ${id}`,
    ];
    for (const attempt of attempts) {
      expect(await refusal(test.database.execute(attempt))).toMatch(/issued|report_references_kept/);
    }
    const manager = await test.signIn('manager');
    expect((await manager.get(`/api/reports/${id}`).expect(200)).body).toEqual(issued);
  });

  it('is stored as PDF and as its twins under the digests that the report states', async () => {
    const [row] = await test.database.select().from(schema.reports).where(eq(schema.reports.id, issued.id));
    const storage = test.app.get(Storage, { strict: false });
    const digest = async (key: string | null) =>
      createHash('sha256')
        .update(await storage.readBytes(key ?? ''))
        .digest('hex');
    expect(await digest(row!.pdfKey)).toBe(issued.pdfSha256);
    expect(await digest(row!.jsonKey)).toBe(issued.jsonSha256);
    expect(await digest(row!.csvKey)).toBe(issued.csvSha256);
  });
});
