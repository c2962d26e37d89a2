import {
  mailPageSchema,
  projectSchema,
  recordingPageSchema,
  reportCheckSchema,
  reportPageSchema,
  reportSchema,
  type Report,
} from '@overtally/contracts';
import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { expectAccessible, keepPicture, launchBrowser, signedInPage } from './support/browser.js';
import { phaseCutCsv } from './support/job.js';
import { personOf, startProduct, type Product } from './support/product.js';

const capture = phaseCutCsv();
const title = 'Dimmer at 90 degrees, whole life';
const mended = 'Measured at 90 degrees, full load; the lamp was warm.';
const recipient = 'quality@ostrel-appliances.example';
const secondManager = {
  email: 'edda@brackwater-lab.example',
  password: 'second-signature-seven',
  name: 'Edda Ruhl',
};

let product: Product;
let browser: Browser;
let projectId: string;
let pdf: Buffer;
let first: Report;

beforeAll(async () => {
  [product, browser] = await Promise.all([startProduct(), launchBrowser()]);
  projectId = await newProject();
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

/** A project of the manager with the demonstration's people in their roles. */
async function newProject(): Promise<string> {
  const { context } = await signedInPage(browser, product.baseUrl, personOf('manager'));
  const made = await context.request.post('/api/projects', {
    data: { name: 'Dimmer type test', customer: 'Ostrel Appliances' },
  });
  const { id } = projectSchema.parse(await made.json());
  for (const role of ['technician', 'analyst', 'guest'] as const) {
    const data = { email: personOf(role).email, role };
    expect((await context.request.post(`/api/projects/${id}/members`, { data })).status()).toBe(201);
  }
  await context.close();
  return id;
}

async function as(
  who: Parameters<typeof personOf>[0] | typeof secondManager,
  act: (page: Page, context: BrowserContext) => Promise<void>,
): Promise<void> {
  const person = typeof who === 'string' ? personOf(who) : who;
  const { page, context } = await signedInPage(browser, product.baseUrl, person);
  await act(page, context);
  await context.close();
}

async function reports({ request }: BrowserContext): Promise<Report[]> {
  const list = reportPageSchema.parse(await (await request.get(`/api/projects/${projectId}/reports`)).json());
  return Promise.all(
    list.items.map(async ({ id }) =>
      reportSchema.parse(await (await request.get(`/api/reports/${id}`)).json()),
    ),
  );
}

const openReport = async (page: Page) => {
  await page.goto(`/projects/${projectId}/reports`);
  await page.getByRole('link', { name: title }).first().click();
  await page.getByRole('heading', { name: title, level: 1 }).waitFor();
};

async function step(page: Page, button: string, confirm: string, fields: Record<string, string> = {}) {
  await page.getByRole('button', { name: button, exact: true }).click();
  const dialog = page.getByRole('alertdialog');
  for (const [label, text] of Object.entries(fields)) await dialog.getByLabel(label).fill(text);
  await dialog.getByRole('button', { name: confirm }).click();
  await dialog.waitFor({ state: 'detached', timeout: 60_000 });
}

const checkOf = async ({ checkCode, number }: Report) => {
  const answer = await fetch(`${product.baseUrl}/api/report-checks/${number}/${checkCode}`);
  return reportCheckSchema.parse(await answer.json());
};

describe('the whole life of a report', () => {
  it('a manager invites a second one, who comes in by the link of the message', async () => {
    await as('manager', async (page) => {
      await page.goto(`/projects/${projectId}/members`);
      await page.getByLabel('E-mail').fill(secondManager.email);
      await page.getByLabel('Role').first().selectOption('manager');
      await page.getByRole('button', { name: 'Add member' }).click();
      await page.getByRole('dialog').getByRole('button', { name: 'Send the invitation' }).click();
      await page.getByText(`${secondManager.email} invited`).waitFor();
      await expectAccessible(page);
    });
    let link = '';
    await as('administrator', async (page) => {
      await page.goto('/mailbox');
      await page.getByRole('row').filter({ hasText: secondManager.email }).getByRole('link').first().click();
      await page.getByText('Plain text', { exact: true }).click();
      const message = await page.getByLabel('Plain text of the message').innerText();
      link = /http\S+#\S+/.exec(message)?.[0] ?? '';
      await keepPicture(page, 'message');
    });
    const context = await browser.newContext({ baseURL: product.baseUrl, locale: 'en-GB' });
    const page = await context.newPage();
    await page.goto(link);
    await page.getByLabel('Your name').fill(secondManager.name);
    await page.getByLabel('Password').fill(secondManager.password);
    await page.getByRole('button', { name: 'Accept' }).click();
    await page.getByRole('heading', { name: 'Recordings', level: 1 }).waitFor();
    await page.goto('about:blank');
    await page.goto(link);
    await page.getByText('This link does not work').waitFor();
    await context.close();
  });

  it('the technician uploads the capture', async () => {
    await as('technician', async (page) => {
      await page.goto(`/projects/${projectId}/recordings`);
      await page.getByLabel('Capture files').setInputFiles(capture.path);
      await page.getByText(/received as/).waitFor();
      await page
        .getByRole('row')
        .filter({ has: page.getByRole('link', { name: capture.name, exact: true }) })
        .getByRole('checkbox', { disabled: false })
        .waitFor({ timeout: 120_000 });
    });
  });

  it('the analyst notes, judges, writes and submits', async () => {
    await as('analyst', async (page, { request }) => {
      const answer = await request.get(`/api/projects/${projectId}/recordings`);
      const [recording] = recordingPageSchema.parse(await answer.json()).items;
      await page.goto(`/projects/${projectId}/recordings/${recording?.id}?channel=1`);
      await page.getByRole('button', { name: 'Add a note' }).click();
      const note = page.getByRole('form', { name: 'New note' });
      await note.getByLabel('Speaks of').selectOption({ label: 'An order' });
      await note.getByLabel('Order').selectOption('15');
      await note.getByLabel('Note').fill('Firing at 90 degrees');
      await note.getByRole('button', { name: 'Add note' }).click();
      await page.getByRole('button', { name: 'Judge', exact: true }).click();
      const dialog = page.getByRole('dialog');
      await dialog.getByRole('button', { name: 'Store the verdict' }).click();
      await dialog
        .getByText(/Over at 15, 17, 19/i)
        .first()
        .waitFor();
      await dialog.getByRole('button', { name: 'Close', exact: true }).first().click();

      await page.goto(`/projects/${projectId}/reports/new`);
      await page.getByLabel('Title').fill(title);
      await page.getByRole('button', { name: 'Add a recipient' }).click();
      await page.getByLabel('E-mail of recipient 1').fill(recipient);
      await page
        .getByRole('checkbox', { name: /class A/ })
        .first()
        .check({ force: true });
      await page.getByRole('button', { name: 'Create the draft' }).click();
      await page.getByRole('heading', { name: title, level: 1 }).waitFor();
      await step(page, 'Submit for review', 'Submit for review');
      await page.getByText('in review').first().waitFor();
    });
  });

  it('the manager returns it with what is to be mended', async () => {
    await as('manager', async (page) => {
      await openReport(page);
      await step(page, 'Return', 'Return the report', { 'What must be mended': 'State the load.' });
      await page.getByText('State the load.').first().waitFor();
      await expectAccessible(page);
      await keepPicture(page, 'report-returned');
    });
  });

  it('the analyst mends it and submits it again', async () => {
    await as('analyst', async (page) => {
      await openReport(page);
      await page.getByText('State the load.').first().waitFor();
      await page.getByRole('button', { name: 'Edit', exact: true }).click();
      await page.getByLabel('Summary').fill(mended);
      await page.getByRole('button', { name: /^Save/ }).click();
      await page.getByText(mended).first().waitFor();
      await step(page, 'Submit for review', 'Submit for review', {
        'Comment for the reviewer': 'Load stated.',
      });
    });
  });

  it('another manager issues it, and its PDF and table say what the API says', async () => {
    await as(secondManager, async (page, context) => {
      await openReport(page);
      await step(page, 'Issue', 'Issue the report');
      await page.getByText('SHA-256 of the issued PDF').waitFor({ timeout: 60_000 });
      await expectAccessible(page);
      await keepPicture(page, 'report-issued');
      const [download] = await Promise.all([
        page.waitForEvent('download'),
        page.getByRole('link', { name: 'Download PDF' }).click(),
      ]);
      const path = await download.path();
      pdf = readFileSync(path);
      [first] = (await reports(context)) as [Report];
      expect(first).toMatchObject({ number: 'HR-0001', revision: 0, status: 'issued' });
      expect(first.issuedBy?.name).toBe(secondManager.name);
      expect(createHash('sha256').update(pdf).digest('hex')).toBe(first.pdfSha256);
      const text = execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' });
      const verdict = first.content.sections[0]!.verdict;
      const judged = verdict.orders.filter(({ sharePercent }) => sharePercent !== null);
      expect(judged.length).toBeGreaterThan(30);
      for (const { order, sharePercent } of judged) {
        const shown = sharePercent! < 0.05 ? '< 0.1' : sharePercent!.toFixed(1);
        const share = shown.replace('.', String.raw`\.`);
        expect(text, `order ${order}`).toMatch(new RegExp(String.raw`^\s*${order}\s.*\s${share}\s*%`, 'm'));
      }
      for (const said of [title, mended, first.number, first.checkCode, secondManager.name]) {
        expect(text).toContain(said);
      }
    });
  });

  it('sends it to its recipient', async () => {
    await as('administrator', async (_, { request }) => {
      const deadline = Date.now() + 30_000;
      for (;;) {
        const { items } = mailPageSchema.parse(await (await request.get('/api/mails?limit=200')).json());
        const mail = items.find(({ to, kind }) => to.email === recipient && kind === 'report-issued');
        if (mail?.status === 'sent') {
          expect(mail.attachments.map(({ sha256 }) => sha256)).toContain(first.pdfSha256);
          return;
        }
        expect(Date.now(), 'the message was not sent in time').toBeLessThan(deadline);
        await new Promise((resolve) => setTimeout(resolve, 250));
      }
    });
  });

  it('the guest reads it, and the check page confirms the copy', async () => {
    await as('guest', async (page) => {
      await openReport(page);
      await page.getByText('SHA-256 of the issued PDF').waitFor();
      await expectAccessible(page);
    });
    const context = await browser.newContext({ baseURL: product.baseUrl, locale: 'en-GB' });
    const page = await context.newPage();
    await page.goto(`/check/${first.number}/${first.checkCode}`);
    await page.getByText('Issued, and current').waitFor();
    await page
      .getByLabel('PDF to compare')
      .setInputFiles({ name: 'report.pdf', mimeType: 'application/pdf', buffer: pdf });
    await page.getByText('It matches byte for byte.').waitFor();
    await context.close();
  });

  it('a second revision takes its place', async () => {
    await as('analyst', async (page) => {
      await openReport(page);
      await page.getByRole('button', { name: 'Make a new revision' }).click();
      await page.getByRole('button', { name: 'Submit for review', exact: true }).waitFor();
      await step(page, 'Submit for review', 'Submit for review', {
        'Reason for the revision': 'The customer asked for the load in the title.',
      });
    });
    await as('manager', async (page, context) => {
      await page.goto(`/projects/${projectId}/reports`);
      await page.getByRole('row').filter({ hasText: 'in review' }).getByRole('link', { name: title }).click();
      await step(page, 'Issue', 'Issue the report');
      await page.getByText('SHA-256 of the issued PDF').waitFor({ timeout: 60_000 });
      await keepPicture(page, 'report-revision');
      const all = await reports(context);
      const [old, current] = [0, 1].map((revision) => all.find((report) => report.revision === revision)!);
      expect(current).toMatchObject({ number: 'HR-0001', status: 'issued', replaces: { id: first.id } });
      expect(old).toMatchObject({ status: 'superseded', pdfSha256: first.pdfSha256, content: first.content });
      expect(await checkOf(first)).toMatchObject({ state: 'superseded', pdfSha256: first.pdfSha256 });
      expect(await checkOf(current!)).toMatchObject({ state: 'current', pdfSha256: current!.pdfSha256 });
      const kept = await context.request.get(`/api/reports/${first.id}/pdf`);
      expect((await kept.body()).equals(pdf)).toBe(true);
    });
  });

  it('nothing that it speaks of can be deleted', async () => {
    await as('technician', async (_, { request }) => {
      const { recording } = first.content.sections[0]!;
      const answer = await request.delete(`/api/recordings/${recording.id}`);
      expect(answer.status(), await answer.text()).toBe(409);
    });
  });
});
