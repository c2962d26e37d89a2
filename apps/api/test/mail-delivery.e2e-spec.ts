import { mailSchema, type Mail, type Report } from '@overtally/contracts';
import { schema } from '@overtally/db';
import { eq } from 'drizzle-orm';
import { createHash } from 'node:crypto';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { Storage } from '../dist/storage/storage.js';
import { newDraft, newIssued, newJudged } from './support/judged-reports.js';
import { startFakeSmtp, type FakeSmtp } from './support/fake-smtp.js';
import { mailsTo, mailTo, makeJobsDue } from './support/mails.js';
import { startTestApp, type TestApp } from './support/test-app.js';
import { startWorker } from './support/workers.js';

let smtp: FakeSmtp;
let test: TestApp;
let report: Report;
let pdf: Uint8Array;

beforeAll(async () => {
  smtp = await startFakeSmtp();
  test = await startTestApp({
    WORKER: 'embedded',
    SMTP_URL: `smtp://127.0.0.1:${smtp.port}`,
    MAIL_FROM: 'Brackwater Laboratory <reports@lab.example>',
    PUBLIC_URL: 'https://lab.example',
  });
  const { verdict } = await newJudged(test);
  report = await newIssued(test, [verdict.id]);
  const [row] = await test.database.select().from(schema.reports).where(eq(schema.reports.id, report.id));
  pdf = await test.app.get(Storage, { strict: false }).readBytes(row!.pdfKey!);
});
afterAll(async () => {
  await test.close();
  await smtp.stop();
});
beforeEach(() => {
  smtp.received.length = 0;
  smtp.refused.clear();
  smtp.diesBeforeReply = false;
});

const sendTo = async (email: string, name = ''): Promise<Mail> => {
  const manager = await test.signIn('manager');
  const reply = await manager.post(`/api/reports/${report.id}/deliveries`).send({ name, email }).expect(201);
  return mailSchema.parse(reply.body);
};

describe('a message with an issued report', () => {
  it('arrives once, with both forms, and the PDF byte for byte', async () => {
    const { id } = await sendTo('quality@kettles.example', 'Käthe <Qualität>');
    await mailTo(test, 'quality@kettles.example');
    expect(smtp.received).toHaveLength(1);
    const { recipients, parsed } = smtp.received[0]!;
    expect(recipients).toEqual(['quality@kettles.example']);
    expect(parsed.from?.value).toEqual([{ name: 'Brackwater Laboratory', address: 'reports@lab.example' }]);
    expect(parsed.to).toMatchObject({
      value: [{ name: 'Käthe <Qualität>', address: 'quality@kettles.example' }],
    });
    expect(parsed.messageId).toBe(`<${id}@lab.example>`);
    // RFC 3834, 5: what no person wrote says so, so that no machine answers it.
    expect(parsed.headers.get('auto-submitted')).toBe('auto-generated');
    for (const words of [report.title, report.number!, 'Rectifier', report.pdfSha256!]) {
      expect(parsed.text).toContain(words);
      expect(parsed.html).toContain(words);
    }
    expect(parsed.html).toContain('Käthe &lt;Qualität&gt;');
    // Nothing is loaded when the message is read.
    expect(parsed.html).not.toMatch(/<(img|link|script|iframe)|url\(/i);
    const [attachment] = parsed.attachments;
    expect(attachment).toMatchObject({
      filename: 'HR-0001-revision-0.pdf',
      contentType: 'application/pdf',
      contentDisposition: 'attachment',
    });
    expect(createHash('sha256').update(attachment!.content).digest('hex')).toBe(report.pdfSha256);
    expect(attachment!.content.equals(Buffer.from(pdf))).toBe(true);
  });

  it('stands among the deliveries of its report, which guests do not see', async () => {
    await sendTo('second@kettles.example');
    await mailTo(test, 'second@kettles.example');
    const technician = await test.signIn('technician');
    const { body } = await technician.get(`/api/reports/${report.id}/deliveries`).expect(200);
    expect(body.items[0]).toMatchObject({
      to: { email: 'second@kettles.example' },
      status: 'sent',
      attempts: 1,
      lastError: null,
      attachments: [{ sha256: report.pdfSha256 }],
    });
    const guest = await test.signIn('guest');
    await guest.get(`/api/reports/${report.id}/deliveries`).expect(403);
  });

  it('fails at once for a recipient whom the server refuses, with its words, and for that one alone', async () => {
    smtp.refused.set('gone@kettles.example', '5.1.1 No such mailbox here');
    await sendTo('gone@kettles.example');
    await sendTo('there@kettles.example');
    const failed = await mailTo(test, 'gone@kettles.example', ({ status }) => status === 'failed');
    expect(failed).toMatchObject({ attempts: 1, sentAt: null });
    expect(failed.lastError).toContain('No such mailbox here');
    await mailTo(test, 'there@kettles.example');
    expect(smtp.received.map(({ recipients }) => recipients)).toEqual([['there@kettles.example']]);

    smtp.refused.clear();
    const manager = await test.signIn('manager');
    await manager.post(`/api/mails/${failed.id}/retry`).expect(200);
    await mailTo(test, 'gone@kettles.example');
    await manager.post(`/api/mails/${failed.id}/retry`).expect(409);
  });

  it('is not sent while its PDF is not the one that was issued', async () => {
    const storage = test.app.get(Storage, { strict: false });
    const [row] = await test.database.select().from(schema.reports).where(eq(schema.reports.id, report.id));
    await storage.put(row!.pdfKey!, new TextEncoder().encode('another file'));
    const { id } = await sendTo('careful@kettles.example');
    const failed = await mailTo(test, 'careful@kettles.example', ({ status }) => status === 'failed');
    expect(failed.lastError).toContain('is not the file that was issued');
    expect(smtp.received).toHaveLength(0);
    await storage.put(row!.pdfKey!, pdf);
    const manager = await test.signIn('manager');
    await manager.post(`/api/mails/${id}/retry`).expect(200);
    await mailTo(test, 'careful@kettles.example');
    expect(smtp.received).toHaveLength(1);
  });
});

describe('a mail server that fails', () => {
  it('when down lets a message wait, which goes out once when it is back', async () => {
    const { port } = smtp;
    await smtp.stop();
    await sendTo('patient@kettles.example');
    const waiting = await mailTo(test, 'patient@kettles.example', ({ attempts }) => attempts > 0);
    expect(waiting.status).toBe('queued');
    expect(waiting.lastError).toContain('ECONNREFUSED');
    smtp = await startFakeSmtp(port);
    await makeJobsDue(test);
    const sent = await mailTo(test, 'patient@kettles.example');
    expect(sent).toMatchObject({ lastError: null });
    expect(sent.attempts).toBeGreaterThanOrEqual(2);
    // Whatever else asks for it to be sent: it was.
    const administrator = await test.signIn('administrator');
    await administrator.post(`/api/mails/${sent.id}/retry`).expect(409);
    await makeJobsDue(test);
    await mailAfter('patient@kettles.example');
    expect(
      smtp.received.filter(({ recipients }) => recipients[0] === 'patient@kettles.example'),
    ).toHaveLength(1);
  });

  // RFC 5321, 6.1: who never hears the yes must send again; the receiver tells the double by its Message-ID.
  it('when it takes a message and dies before saying so gets it again, under the same Message-ID', async () => {
    smtp.diesBeforeReply = true;
    await sendTo('twice@kettles.example');
    const waiting = await mailTo(test, 'twice@kettles.example', ({ attempts }) => attempts > 0);
    expect(waiting.status).toBe('queued');
    smtp.diesBeforeReply = false;
    await makeJobsDue(test);
    await mailTo(test, 'twice@kettles.example');
    const ids = smtp.received.map(({ parsed }) => parsed.messageId);
    expect(ids.length).toBeGreaterThanOrEqual(2);
    expect(new Set(ids)).toEqual(new Set([`<${waiting.id}@lab.example>`]));
  });
});

describe('the steps of a report', () => {
  it('ask managers for review, tell authors of a return with its reason, and send the issue', async () => {
    const { verdict } = await newJudged(test);
    const draft = await newDraft(test, [verdict.id]);
    const [analyst, manager] = [await test.signIn('analyst'), await test.signIn('manager')];
    const before = (await mailsTo(test, 'manager@example.com')).length;
    await analyst
      .post(`/api/reports/${draft.id}/submit`)
      .send({ comment: 'Please look at order 15' })
      .expect(200);
    const asked = await mailTo(test, 'manager@example.com', ({ reportId }) => reportId === draft.id);
    expect(asked.kind).toBe('review-requested');
    expect(asked.text).toContain('Please look at order 15');
    expect(asked.text).toContain(`https://lab.example/projects/${test.project.id}/reports/${draft.id}`);
    expect(await mailsTo(test, 'manager@example.com')).toHaveLength(before + 1);

    await manager.post(`/api/reports/${draft.id}/return`).send({ comment: 'Name the <chain>' }).expect(200);
    const returned = await mailTo(test, 'analyst@example.com', ({ reportId }) => reportId === draft.id);
    expect(returned.kind).toBe('report-returned');
    expect(returned.text).toContain('> Name the <chain>');
    expect(returned.html).toContain('Name the &lt;chain&gt;');

    await test.database
      .update(schema.reports)
      .set({ recipients: [{ name: '', email: 'customer@kettles.example' }] })
      .where(eq(schema.reports.id, draft.id));
    await analyst.post(`/api/reports/${draft.id}/submit`).send({}).expect(200);
    const issued = (await manager.post(`/api/reports/${draft.id}/issue`).send({}).expect(200)).body as Report;
    await mailTo(test, 'customer@kettles.example');
    const received = smtp.received.find(({ recipients }) => recipients[0] === 'customer@kettles.example')!;
    const [attached] = received.parsed.attachments;
    expect(createHash('sha256').update(attached!.content).digest('hex')).toBe(issued.pdfSha256);
    const told = await mailTo(test, 'analyst@example.com', ({ kind }) => kind === 'report-issued');
    expect(told.attachments).toEqual([]);
  });

  it('send nothing of a step that is refused', async () => {
    const { verdict } = await newJudged(test);
    const draft = await newDraft(test, [verdict.id]);
    const manager = await test.signIn('manager');
    await manager.post(`/api/reports/${draft.id}/issue`).send({}).expect(409);
    await manager
      .post(`/api/reports/${draft.id}/deliveries`)
      .send({ email: 'early@kettles.example' })
      .expect(409);
    expect(await mailsTo(test, 'early@kettles.example')).toEqual([]);
  });
});

it('two workers side by side send each message once', async () => {
  const second = await startWorker(test);
  try {
    const addresses = Array.from({ length: 12 }, (_, i) => `reader${i}@kettles.example`);
    await Promise.all(addresses.map((address) => sendTo(address)));
    for (const address of addresses) await mailTo(test, address);
    expect(smtp.received.map(({ recipients }) => recipients[0]).sort()).toEqual([...addresses].sort());
  } finally {
    await second.close();
  }
});

/** Waits until a message sent later than all others has arrived, so that whatever was due has run. */
async function mailAfter(address: string): Promise<void> {
  const later = `after-${address}`;
  await sendTo(later);
  await mailTo(test, later);
}
