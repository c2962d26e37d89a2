import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { expectAccessible, keepPicture, launchBrowser, signedInPage } from './support/browser.js';
import { jumpAtS, jumpingSineCsv, limitedToneWav, probedSineCsv, squareWaveCsv } from './support/job.js';
import { personOf, startProduct, type Product } from './support/product.js';

let product: Product;
let browser: Browser;

beforeAll(async () => {
  [product, browser] = await Promise.all([startProduct(), launchBrowser()]);
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

/** Uploads a capture on the page of recordings and waits until its row is ready. */
async function upload(page: Page, capture: { path: string; name: string }): Promise<void> {
  await page.getByLabel('Capture files').setInputFiles(capture.path);
  await page.getByText(/received as/).waitFor();
  await page
    .getByRole('row')
    .filter({ has: page.getByRole('link', { name: capture.name, exact: true }) })
    .first()
    .getByRole('checkbox', { disabled: false })
    .waitFor({ timeout: 60_000 });
}

/** THD_F as the sheet's table of figures shows it, in percent. */
async function shownThd(page: Page): Promise<number> {
  const row = page.getByRole('row').filter({ hasText: 'THD, of the fundamental' });
  const text = await row.getByRole('cell').nth(1).innerText();
  return Number.parseFloat(text);
}

async function openProject(page: Page, name: RegExp): Promise<void> {
  await page.goto('/projects');
  await page.getByRole('link', { name }).click();
  await page.getByRole('heading', { name: 'Recordings', level: 1 }).waitFor();
}

/** A second of samples whose time runs back near the end, far behind what a preview sees. */
function backwardsRows(): string {
  const rows = Array.from(
    { length: 30_000 },
    (_, i) => `${(i / 30_000).toFixed(6)},${Math.sin(i / 95).toFixed(6)}`,
  );
  return [...rows, '0.500000,0.100000', ''].join('\n');
}

describe('a technician', () => {
  let context: BrowserContext;
  let page: Page;

  beforeAll(async () => {
    context = await browser.newContext({ baseURL: product.baseUrl, locale: 'en-GB' });
    context.setDefaultTimeout(30_000);
    page = await context.newPage();
  });

  it('is told plainly when the password is wrong, then signs in', async () => {
    const { email, password } = personOf('technician');
    await page.goto('/');
    await page.getByLabel('E-mail').fill(email);
    await page.getByLabel('Password').fill('not the password');
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.getByRole('alert').first().waitFor();
    await expectAccessible(page);
    await page.getByLabel('Password').fill(password);
    await page.getByRole('button', { name: 'Sign in' }).click();
    await page.getByRole('heading', { name: 'Projects', level: 1 }).waitFor();
    await expectAccessible(page);
  });

  it('uploads a CSV and reads the THD of a square wave cut off at order 40', async () => {
    const capture = squareWaveCsv();
    await openProject(page, /Ostrel/);
    await upload(page, capture);
    await expectAccessible(page);
    await page.getByRole('link', { name: capture.name, exact: true }).click();
    await page.getByRole('heading', { name: capture.name, level: 1 }).waitFor();
    await page.getByRole('row').filter({ hasText: 'THD, of the fundamental' }).waitFor();
    // Closed form: sqrt(sum of 1/h², h = 3, 5 … 39).
    expect(Math.abs((await shownThd(page)) - capture.thdFPercent)).toBeLessThanOrEqual(capture.tolerance);
    await keepPicture(page, 'sheet');
    await expectAccessible(page);
  });

  it('is led by a flag to the place in the waveform where samples are missing', async () => {
    const capture = jumpingSineCsv();
    await openProject(page, /Ostrel/);
    await upload(page, capture);
    await page.getByRole('link', { name: capture.name, exact: true }).click();
    await page.getByText('Jump in the record').waitFor();
    await page.getByRole('button', { name: /^Show 0\.50\d.s in the waveform$/ }).click();
    const inView = page.getByRole('slider', { name: 'Part of the record in view' });
    const fromS = Number(await inView.getAttribute('aria-valuenow'));
    // Four cycles of 50 Hz around the jump.
    expect(Math.abs(fromS + 0.04 - jumpAtS)).toBeLessThan(0.002);
    await expectAccessible(page);
  });

  it('follows an order over time, and reads the power of three phases', async () => {
    await openProject(page, /Ostrel/);
    await page.getByRole('link', { name: /three-phase/ }).click();
    const spectrum = page.getByRole('region', { name: /by order$/ }).first();
    await spectrum.getByText('Table', { exact: true }).click();
    await spectrum.getByRole('button', { name: '5', exact: true }).click();
    await spectrum.getByRole('button', { name: 'Over time' }).click();
    const overTime = page.getByRole('region', { name: /order 5, group over time$/ });
    await overTime.getByText('Table', { exact: true }).click();
    // One second holds four whole windows of ten cycles of 49.97 Hz.
    await overTime.getByText('4 rows').waitFor();
    await expectAccessible(page);
    await page.getByText('Power', { exact: true }).click();
    await page.getByRole('heading', { name: /^Power of three phases/ }).waitFor();
    await page.getByText('u1 with i1', { exact: true }).click();
    await page.getByRole('table', { name: /grouped as in IEEE 1459$/ }).waitFor();
    await page.getByRole('region', { name: /^Active power by order/ }).waitFor();
    await keepPicture(page, 'power');
    await expectAccessible(page);
  });

  it('uploads a WAV, is told that it is there already, and reads its THD', async () => {
    const capture = limitedToneWav();
    await openProject(page, /Tollan/);
    await upload(page, capture);
    await page.getByText(/the same file as/).waitFor();
    await page.getByRole('link', { name: capture.name, exact: true }).click();
    await page.getByRole('row').filter({ hasText: 'THD, of the fundamental' }).waitFor();
    expect(Math.abs((await shownThd(page)) - capture.thdFPercent)).toBeLessThanOrEqual(capture.tolerance);
    await page.goBack();
    await page.getByRole('button', { name: 'Remove this copy' }).click();
    await page.getByText(/removed$/).waitFor();
    await page.getByText('3 recordings').waitFor();
  });

  it('is asked for what a file does not say, and told what is wrong with one that cannot be read', async () => {
    await openProject(page, /Ostrel/);
    await page.getByLabel('Capture files').setInputFiles({
      name: 'no-rate.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from(Array.from({ length: 4000 }, (_, i) => Math.sin(i / 10).toFixed(6)).join('\n')),
    });
    const dialog = page.getByRole('dialog');
    await dialog.getByText('Needed to read this file').waitFor();
    await expectAccessible(page);
    await dialog.getByLabel('Sample rate in Hz').fill('5000');
    await dialog.getByRole('button', { name: 'Read with these settings' }).click();
    await page.getByRole('link', { name: 'no-rate', exact: true }).waitFor();

    await page.getByLabel('Capture files').setInputFiles({
      name: 'garbage.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from(Array.from({ length: 3000 }, (_, i) => (i * 7919) % 256)),
    });
    await dialog.getByText(/holds binary data that is not recognised/).waitFor();
    const read = dialog.getByRole('button', { name: 'Read with these settings' });
    await read.and(page.locator(':disabled')).waitFor();
    await dialog.getByRole('button', { name: 'Leave this file out' }).click();
    await page.getByText('left out, not sent').waitFor();

    // What the first 256 KiB do not show comes out when the file is read; the recording says it.
    await page.getByLabel('Capture files').setInputFiles({
      name: 'backwards.csv',
      mimeType: 'text/csv',
      buffer: Buffer.from(`t_s,u_V\n${backwardsRows()}`),
    });
    const row = page.getByRole('row').filter({ hasText: 'backwards' });
    await row
      .getByText(/Not read:/)
      .filter({ visible: true })
      .waitFor({ timeout: 60_000 });
  });

  it('sees a wrong probe ratio before reading, corrects it, and keeps the cure for the files that follow', async () => {
    await openProject(page, /Ostrel/);
    await page.getByLabel('Check before reading').check();
    await page.getByLabel('Capture files').setInputFiles(probedSineCsv('probe-01.csv'));
    const dialog = page.getByRole('dialog');
    // 230 V behind 100:1; the clock in ms beside the time is no channel.
    await dialog.getByText('2.300 V', { exact: true }).waitFor();
    await dialog.getByText('50.00 Hz', { exact: true }).waitFor();
    expect(await dialog.getByLabel('Read column ms').isChecked()).toBe(false);
    await dialog.getByLabel('Probe ratio of column U').fill('100 : 1');
    await dialog.getByText('230.0 V', { exact: true }).waitFor();
    await dialog.getByRole('button', { name: /Keep these settings as a reading rule/ }).click();
    await dialog.getByLabel('Name of the rule').fill('Probe at 100 : 1');
    await expectAccessible(page);
    await keepPicture(page, 'import');
    await dialog.getByRole('button', { name: 'Keep the rule' }).click();
    await dialog.getByText(/Read by the rule/).waitFor();
    await dialog.getByRole('button', { name: 'Read with these settings' }).click();
    await page.getByRole('link', { name: 'probe-01', exact: true }).waitFor();

    await page.getByLabel('Check before reading').uncheck();
    await page.getByLabel('Capture files').setInputFiles(probedSineCsv('probe-02.csv'));
    await page.getByRole('link', { name: 'probe-02', exact: true }).click();
    const read = page.getByRole('region', { name: 'Reading', exact: true });
    await read.getByText('Probe at 100 : 1').waitFor();
    await read.getByText(/probe 100 : 1/).waitFor();
    // The row of the rms of the whole record; its digits follow its uncertainty.
    const rms = page.getByRole('row').filter({ hasText: 'DC included' }).getByRole('cell').nth(1);
    await rms.waitFor({ timeout: 60_000 });
    expect(Number.parseFloat(await rms.innerText())).toBeCloseTo(230, 2);
    await expectAccessible(page);

    await page.getByRole('link', { name: 'Settings' }).click();
    const rule = page.getByRole('row').filter({ hasText: 'probe-*.csv' });
    await rule
      .getByText(/probe 100 : 1/)
      .filter({ visible: true })
      .waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'reading-rules');
  }, 240_000);

  it('finds no way to judge or to issue, and the server agrees', async () => {
    const technician = await signedInPage(browser, product.baseUrl, personOf('technician'));
    const answer = await technician.context.request.get('/api/projects');
    const { items } = (await answer.json()) as { items: { id: string }[] };
    const created = await technician.context.request.post(`/api/projects/${items[0]?.id}/reports`, {
      data: { title: 'Mine', verdictIds: ['00000000-0000-4000-8000-000000000000'] },
    });
    expect(created.status()).toBe(403);
    await technician.context.close();
  });
});
