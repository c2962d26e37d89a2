import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import type { Browser, BrowserContext, Page, Request } from 'playwright-core';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { linkTo, type BreakableLink } from './support/breakable-link.js';
import { expectAccessible, keepPicture, launchBrowser, signedInPage } from './support/browser.js';
import { folderOfCaptures, longCsv } from './support/bulk.js';
import { personOf, startProduct, type Product } from './support/product.js';

let product: Product;
let browser: Browser;
let link: BreakableLink;
let context: BrowserContext;
let page: Page;

beforeAll(async () => {
  [product, browser] = await Promise.all([startProduct(), launchBrowser()]);
  link = await linkTo(product.baseUrl);
  ({ page, context } = await signedInPage(browser, link.url, personOf('technician')));
  // Leaving the page in the middle of an upload is asked about.
  page.on('dialog', (dialog) => void dialog.accept());
});

afterAll(async () => {
  await browser?.close();
  link?.close();
  await product?.stop();
});

beforeEach(async () => {
  await page.goto('/projects');
  await page.getByRole('link', { name: /Ostrel/ }).click();
  await page.getByRole('heading', { name: 'Recordings', level: 1 }).waitFor();
});

/** Lets the page send no more than so many bytes a second; 0 for as fast as it goes. */
async function throttle(bytesPerS: number): Promise<void> {
  const devtools = await context.newCDPSession(page);
  await devtools.send('Network.enable');
  await devtools.send('Network.emulateNetworkConditions', {
    ...{ offline: false, latency: 0, downloadThroughput: -1, uploadThroughput: bytesPerS || -1 },
  });
}

/** Requests of the upload protocol, as "PATCH 1024" with the offset that they name. */
function watchProtocol(): string[] {
  const seen: string[] = [];
  page.on('request', (request: Request) => {
    if (!request.url().includes('/uploads') || request.method() === 'GET') return;
    seen.push(`${request.method()} ${request.headers()['upload-offset'] ?? ''}`.trim());
  });
  return seen;
}

/** Waits until a row says that a share between 20 % and 80 % has been sent. */
const halfway = () =>
  page
    .getByText(/^[2-7]\d\s%,/)
    .first()
    .waitFor();

describe('uploads', () => {
  it('go on after a pause and after a reload where they stopped, and arrive byte for byte', async () => {
    const capture = longCsv();
    const sha256 = createHash('sha256').update(readFileSync(capture.path)).digest('hex');
    await throttle(600_000);
    await page.getByLabel('Capture files').setInputFiles(capture.path);
    await halfway();
    await page.getByRole('button', { name: 'Pause long.csv' }).click();
    await page.getByText(/^paused at \d+\s%/).waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'upload-paused');

    await page.reload();
    const brokenOff = page.getByRole('listitem').filter({ hasText: 'Drop the file again to go on at' });
    await brokenOff.waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'upload-broken-off');

    const protocol = watchProtocol();
    await throttle(0);
    await page.getByLabel('Capture files').setInputFiles(capture.path);
    await page
      .getByText(`checked, SHA-256 ${sha256.slice(0, 4)} ${sha256.slice(4, 8)} … ${sha256.slice(-4)}`)
      .waitFor();
    // The first request asks where it stopped, the second sends the rest; none begins anew.
    expect(protocol[0]).toBe('HEAD');
    const offset = Number(protocol[1]?.replace('PATCH ', ''));
    expect(offset).toBeGreaterThan(0);
    expect(offset).toBeLessThan(readFileSync(capture.path).length);
    expect(protocol.filter((request) => request.startsWith('PATCH'))).toHaveLength(1);
    await keepPicture(page, 'upload-done');
  });

  it('wait for a broken connection and go on by themselves', async () => {
    const capture = longCsv(7);
    await throttle(600_000);
    await page.getByLabel('Capture files').setInputFiles(capture.path);
    await halfway();
    const protocol = watchProtocol();
    link.cut();
    await page.getByText(/^Connection lost, trying again/).waitFor();
    await expectAccessible(page);
    await keepPicture(page, 'upload-interrupted');
    link.mend();
    await throttle(0);
    await page.getByText(/received as/).waitFor();
    // The last PATCH sends the rest, and no upload began anew.
    expect(Number(protocol.findLast((request) => request.startsWith('PATCH'))?.slice(6))).toBeGreaterThan(0);
    // The one POST makes the recording.
    expect(protocol.filter((request) => request.startsWith('POST'))).toHaveLength(1);
  });

  it('are stopped for good on request', async () => {
    const capture = longCsv(11);
    await throttle(600_000);
    await page.getByLabel('Capture files').setInputFiles(capture.path);
    await halfway();
    await page.getByRole('button', { name: 'Stop long.csv' }).click();
    await page.getByText('stopped, nothing was kept').waitFor();
    await throttle(0);
    await page.reload();
    await page.getByText(/^Drop captures, folders/).waitFor();
    expect(await page.getByText('Drop the file again').count()).toBe(0);
  });

  it('take a folder, join a pair of COMTRADE files and unpack an archive', async () => {
    await page.getByLabel('Folder of captures').setInputFiles(folderOfCaptures());
    await page.getByText('of plant.cfg and plant.dat').waitFor();
    await page.getByText('2 recordings, 1 left out').waitFor();
    await page.getByText('What was left out').click();
    await page.getByText(/^lone\.cfg: /).waitFor();
    await page.getByText('3 of 3 received', { exact: true }).waitFor();
    // What is hidden, and what operating systems leave, is not on the list.
    expect(await page.getByText(/DS_Store|\.hidden/).count()).toBe(0);
    await expectAccessible(page);
    await keepPicture(page, 'upload-folder');
    await page.setViewportSize({ width: 390, height: 844 });
    await keepPicture(page, 'upload-folder-narrow');
    await page.getByRole('link', { name: 'plant', exact: true }).click();
    await page.getByRole('heading', { name: 'plant', level: 1 }).waitFor();
  });
});
