import { projectPageSchema, reportPageSchema, reportSchema, type Report } from '@overtally/contracts';
import { Buffer } from 'node:buffer';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { expectAccessible, keepPicture, launchBrowser, signedInPage } from './support/browser.js';
import { personOf, startProduct, type Product } from './support/product.js';

let product: Product;
let browser: Browser;
let report: Report;
let pdf: Buffer;

beforeAll(async () => {
  [product, browser] = await Promise.all([startProduct(), launchBrowser()]);
  report = await issuedDemoReport();
});
afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

/** Waits for the draft of the demonstration, takes it through review and issues it. */
async function issuedDemoReport(): Promise<Report> {
  const { context: analyst } = await signedInPage(browser, product.baseUrl, personOf('analyst'));
  const { context: manager } = await signedInPage(browser, product.baseUrl, personOf('manager'));
  const projects = projectPageSchema.parse(await (await analyst.request.get('/api/projects')).json());
  const projectId = projects.items.find(({ name }) => name.startsWith('Ostrel'))?.id ?? '';
  const draft = await draftOf(analyst, projectId);
  const submitted = await analyst.request.post(`/api/reports/${draft}/submit`, { data: {} });
  expect(submitted.status()).toBe(200);
  const answer = await manager.request.post(`/api/reports/${draft}/issue`, {
    data: { overdueReason: 'The demonstration states a reason in case one is needed.' },
  });
  expect(answer.status()).toBe(200);
  pdf = await (await manager.request.get(`/api/reports/${draft}/pdf`)).body();
  const issued = reportSchema.parse(await answer.json());
  await Promise.all([analyst.close(), manager.close()]);
  return issued;
}

async function draftOf({ request }: BrowserContext, projectId: string): Promise<string> {
  const deadline = Date.now() + 150_000;
  while (Date.now() < deadline) {
    const answer = await request.get(`/api/projects/${projectId}/reports?status=draft`);
    const [draft] = reportPageSchema.parse(await answer.json()).items;
    if (draft) return draft.id;
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
  throw new Error('The demonstration made no draft in time');
}

/** A page of somebody without an account. */
async function publicPage(options: Parameters<Browser['newContext']>[0] = {}): Promise<Page> {
  const context = await browser.newContext({ baseURL: product.baseUrl, locale: 'en-GB', ...options });
  context.setDefaultTimeout(30_000);
  return context.newPage();
}

const choose = (page: Page, name: string, buffer: Buffer) =>
  page.getByLabel('PDF to compare').setInputFiles({ name, mimeType: 'application/pdf', buffer });

describe('the public check page', () => {
  it('tells whether a report counts, and a file from one with a changed byte', async () => {
    const page = await publicPage();
    const sent: string[] = [];
    page.on('request', (request) => {
      if (request.method() !== 'GET') sent.push(request.url());
    });
    await page.goto('/check');
    await expectAccessible(page);
    await page.getByLabel('Report number').fill(report.number ?? '');
    await page.getByLabel('Check code').fill((report.checkCode ?? '').toLowerCase().replaceAll('-', ' '));
    await page.keyboard.press('Enter');
    await page.getByText('Issued, and current').waitFor();
    expect(await page.getByText(report.pdfSha256 ?? 'none').count()).toBe(1);

    await choose(page, 'report.pdf', pdf);
    await page.getByText('It matches byte for byte.').waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'check-matches');
    const changed = Buffer.from(pdf);
    changed[changed.length >> 1]! ^= 1;
    await choose(page, 'copy.pdf', changed);
    await page.getByText('It is not the file that was issued.').waitFor();
    expect(sent).toEqual([]);

    const shown = await page.locator('body').innerText();
    for (const hidden of [report.title, report.content.project.name, report.preparedBy.name]) {
      expect(shown).not.toContain(hidden);
    }
    await page.context().close();
  });

  it('says alike that a number or a code is unknown, and reads well on a dark phone', async () => {
    const page = await publicPage({ viewport: { width: 390, height: 844 }, colorScheme: 'dark' });
    for (const address of [
      `/check/HR-9999/${report.checkCode}`,
      `/check/${report.number}/0000-0000-0000-0000`,
    ]) {
      await page.goto(address);
      await page.getByText('No report was issued under this number and code.').waitFor();
    }
    await expectAccessible(page);
    await page.goto(new URL(report.checkUrl ?? '').pathname);
    await page.getByText('Issued, and current').waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'check-narrow-dark');
    const overflow = await page.evaluate(
      () => document.documentElement.scrollWidth - document.documentElement.clientWidth,
    );
    expect(overflow).toBe(0);
    await page.context().close();
  });
});
