import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import type { Browser, Page } from 'playwright-core';
import {
  analysisSchema,
  projectPageSchema,
  recordingPageSchema,
  reportPageSchema,
  reportSchema,
} from '@overtally/contracts';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { expectAccessible, keepPicture, launchBrowser, signedInPage } from './support/browser.js';
import { phaseCutCsv } from './support/job.js';
import { personOf, startProduct, type Product } from './support/product.js';

const title = 'Hood module at phase control, browser check';
const noteText = 'Rises with the firing angle; checked at 60 degrees';

let product: Product;
let browser: Browser;
let projectId: string;
let recording: { id: string; analysisId: string };

beforeAll(async () => {
  [product, browser] = await Promise.all([startProduct(), launchBrowser()]);
  await analysedDemo();
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

/** Waits until the pipeline has analysed every capture of the demonstration's emission project. */
async function analysedDemo(): Promise<void> {
  const { context } = await signedInPage(browser, product.baseUrl, personOf('analyst'));
  const projects = projectPageSchema.parse(await (await context.request.get('/api/projects')).json());
  projectId = projects.items.find(({ name }) => name.startsWith('Ostrel'))?.id ?? '';
  const deadline = Date.now() + 150_000;
  while (Date.now() < deadline) {
    const answer = await context.request.get(`/api/projects/${projectId}/recordings?limit=50`);
    const { items } = recordingPageSchema.parse(await answer.json());
    const phaseCut = items.find(({ file }) => file.name === 'dimmer-90deg.csv');
    if (items.length >= 8 && items.every(({ status }) => status === 'ready') && phaseCut) {
      recording = { id: phaseCut.id, analysisId: phaseCut.latestAnalysisId ?? '' };
      return context.close();
    }
    await new Promise((resolve) => setTimeout(resolve, 500));
  }
  throw new Error('The captures of the demonstration were not analysed in time');
}

const sheetOf = (page: Page) => page.goto(`/projects/${projectId}/recordings/${recording.id}?channel=1`);

describe('from a recording to an issued report', () => {
  it('the analyst notes what a dominant order comes from', async () => {
    const { page, context } = await signedInPage(browser, product.baseUrl, personOf('analyst'));
    await sheetOf(page);
    await page.getByRole('button', { name: 'Add a note' }).click();
    const form = page.getByRole('form', { name: 'New note' });
    await form.getByLabel('Speaks of').selectOption({ label: 'An order' });
    await form.getByLabel('Order').selectOption('15');
    await form.getByLabel('Note').fill(noteText);
    await form.getByRole('button', { name: 'Add note' }).click();
    await page.getByText(noteText).waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'sheet-noted');
    await context.close();
  });

  it('the analyst overlays two recordings by order', async () => {
    const { page, context } = await signedInPage(browser, product.baseUrl, personOf('analyst'));
    await page.goto(`/projects/${projectId}/recordings`);
    for (const name of [/90°/, /25°/]) {
      await page.getByRole('row').filter({ hasText: name }).getByRole('checkbox').check({ force: true });
    }
    await page.getByRole('button', { name: 'Overlay 2 recordings' }).click();
    await page.getByRole('heading', { name: 'Overlay', level: 1 }).waitFor();
    await page.locator('.js-plotly-plot .scatterlayer .trace').nth(1).waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'overlay');
    await context.close();
  });

  it('the analyst judges by class A and finds the orders over that the closed form puts there', async () => {
    const { page, context } = await signedInPage(browser, product.baseUrl, personOf('analyst'));
    await sheetOf(page);
    await page.getByRole('button', { name: 'Judge', exact: true }).click();
    const dialog = page.getByRole('dialog');
    await dialog.getByRole('button', { name: 'Store the verdict' }).click();
    // Phase control at 90° of a resistive load: orders 15, 17 and 19 are over class A, Fourier integral.
    await dialog
      .getByText(/Over at 15, 17, 19/i)
      .first()
      .waitFor();
    await expectAccessible(page);
    await dialog.getByRole('button', { name: 'Close', exact: true }).first().click();
    await context.close();
  });

  it('the analyst writes the report and submits it', async () => {
    const { page, context } = await signedInPage(browser, product.baseUrl, personOf('analyst'));
    await page.goto(`/projects/${projectId}/reports`);
    await page.getByRole('link', { name: 'New report' }).click();
    await page.getByLabel('Title').fill(title);
    await page.getByLabel('Summary').fill('Type test at phase control of 90 degrees.');
    // The demonstration may have judged this channel too: the newest verdict stands first.
    await page
      .getByRole('checkbox', { name: /R-0008 I, .*class A/ })
      .first()
      .check({ force: true });
    await page.getByRole('button', { name: 'Create the draft' }).click();
    await page.getByRole('heading', { name: title, level: 1 }).waitFor();
    await expectAccessible(page);
    await page.getByRole('button', { name: 'Submit for review' }).click();
    await page.getByRole('alertdialog').getByRole('button', { name: 'Submit for review' }).click();
    await page.getByText('in review').first().waitFor();
    expect(await page.getByRole('button', { name: 'Issue', exact: true }).count()).toBe(0);
    await context.close();
  });

  it('the manager issues it, and the PDF says what the API says', async () => {
    const { page, context } = await signedInPage(browser, product.baseUrl, personOf('manager'));
    await page.goto(`/projects/${projectId}/reports`);
    await page.getByRole('link', { name: title }).click();
    await page.getByRole('button', { name: 'Issue', exact: true }).click();
    await page.getByRole('alertdialog').getByRole('button', { name: 'Issue the report' }).click();
    await page.getByText('SHA-256 of the issued PDF').waitFor({ timeout: 60_000 });
    await keepPicture(page, 'report');
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.getByRole('link', { name: 'Download PDF' }).click(),
    ]);
    const path = await download.path();
    const list = reportPageSchema.parse(
      await (await context.request.get(`/api/projects/${projectId}/reports`)).json(),
    );
    const report = reportSchema.parse(
      await (await context.request.get(`/api/reports/${list.items[0]?.id}`)).json(),
    );
    expect(createHash('sha256').update(readFileSync(path)).digest('hex')).toBe(report.pdfSha256);
    const text = execFileSync('pdftotext', ['-layout', path, '-'], { encoding: 'utf8' });
    expect(text).toContain(report.number);
    expect(text).toContain(title);
    expect(text).toContain(noteText);
    const section = report.content.sections[0];
    expect(text).toContain(section?.recording.file.sha256);
    const order15 = section?.verdict.orders.find(({ order }) => order === 15);
    expect(order15?.sharePercent).toBeGreaterThan(100);
    expect(text).toContain(`${order15?.sharePercent?.toFixed(1)}`);
    expect(text).toMatch(/page\s+1\s+of\s+\d+/i);
    await context.close();
  });

  it('shows the THD of the capture as the closed form has it', async () => {
    const { context } = await signedInPage(browser, product.baseUrl, personOf('guest'));
    const answer = await context.request.get(`/api/analyses/${recording.analysisId}`);
    const analysis = analysisSchema.parse(await answer.json());
    const { thdFPercent, tolerance } = phaseCutCsv();
    const shown = analysis.channels[1]?.thdFPercent ?? Number.NaN;
    expect(Math.abs(shown - thdFPercent)).toBeLessThanOrEqual(tolerance);
    await context.close();
  });

  it('the guest reads the issued report and can change nothing', async () => {
    const { page, context } = await signedInPage(browser, product.baseUrl, personOf('guest'));
    await page.goto(`/projects/${projectId}/reports`);
    await page.getByRole('link', { name: title }).click();
    await page.getByText('SHA-256 of the issued PDF').waitFor();
    await expectAccessible(page);
    for (const act of ['Issue', 'Return', 'Edit', 'Submit for review', 'Delete draft']) {
      expect(await page.getByRole('button', { name: act, exact: true }).count()).toBe(0);
    }
    await page.goto(`/projects/${projectId}/recordings`);
    await page.getByRole('link', { name: /90°/ }).waitFor();
    expect(await page.getByLabel('Capture files').count()).toBe(0);
    await context.close();
  });
});
