import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { calibrationNoticesJob } from '../dist/jobs/definitions/calibration-notices.job.js';
import { JobsService } from '../dist/jobs/jobs.service.js';
import { made } from './support/factories.js';
import { mailsTo, mailTo } from './support/mails.js';
import { startTestApp, type TestApp } from './support/test-app.js';

const { calibrations, instruments } = schema;

let test: TestApp;
beforeAll(async () => {
  test = await startTestApp({ WORKER: 'embedded' });
});
afterAll(() => test.close());

const dayFromNow = (days: number) => new Date(Date.now() + days * 86_400_000).toISOString().slice(0, 10);

async function newInstrument(name: string, dueInDays: number, responsibleId: string | null = null) {
  const createdById = test.people.manager.id;
  const [row] = await test.database
    .insert(instruments)
    .values({ kind: 'recorder', name, serialNumber: `SN ${name}`, responsibleId, createdById })
    .returning();
  const { id: instrumentId } = made(row);
  await calibrate(instrumentId, dueInDays, -400);
  return instrumentId;
}

const calibrate = (instrumentId: string, dueInDays: number, doneInDays: number) =>
  test.database.insert(calibrations).values({
    ...{ instrumentId, calibratedOn: dayFromNow(doneInDays), dueOn: dayFromNow(dueInDays) },
    createdById: test.people.manager.id,
  });

const runNow = () =>
  test.database.transaction((tx) => test.app.get(JobsService).enqueue(tx, calibrationNoticesJob, {}));

it('tells each person in one message, of each calibration once, 30 days ahead', async () => {
  const analyst = test.people.analyst.id;
  await newInstrument('Clamp 1', 30, analyst);
  await newInstrument('Clamp 2', -3, analyst);
  await newInstrument('Clamp far', 31, analyst);
  await newInstrument('Nobody’s recorder', 12);
  await runNow();
  const told = await mailTo(test, 'analyst@example.com');
  expect(told.kind).toBe('calibration-due');
  expect(told.subject).toBe('Calibration due: 2 instruments');
  expect(told.text).toContain(`Clamp 1, serial number SN Clamp 1: due on ${dayFromNow(30)}`);
  expect(told.text).toContain(`Clamp 2, serial number SN Clamp 2: overdue since ${dayFromNow(-3)}`);
  expect(told.text).not.toContain('Clamp far');
  expect((await mailTo(test, 'administrator@example.com')).text).toContain('Nobody’s recorder');

  // Another day, with one more instrument: what was told is not told again.
  const late = await newInstrument('Shunt', 5, analyst);
  await runNow();
  const second = await mailTo(
    test,
    'analyst@example.com',
    ({ id, status }) => id !== told.id && status === 'sent',
  );
  expect(second.subject).toBe('Calibration due: 1 instrument');
  expect(second.text).toContain('Shunt');
  expect(await mailsTo(test, 'administrator@example.com')).toHaveLength(1);

  // A calibration of its own is told of anew.
  await calibrate(late, 20, -1);
  await runNow();
  const third = await mailTo(
    test,
    'analyst@example.com',
    ({ id, status }) => id !== told.id && id !== second.id && status === 'sent',
  );
  expect(third.text).toContain(`due on ${dayFromNow(20)}`);
  const rows = await test.database.select().from(calibrations).where(eq(calibrations.instrumentId, late));
  expect(rows.every(({ dueNoticeSentAt }) => dueNoticeSentAt !== null)).toBe(true);
});
