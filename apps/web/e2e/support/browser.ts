import AxeBuilder from '@axe-core/playwright';
import type { DemoPerson } from '@overtally/fixtures';
import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { expect } from 'vitest';

export function launchBrowser(): Promise<Browser> {
  return chromium.launch({
    executablePath: process.env.CHROMIUM_PATH ?? '/usr/bin/chromium',
    args: ['--disable-gpu', '--disable-background-networking', '--disable-component-update'],
  });
}

/** A page of a person who has signed in through the API. */
export async function signedInPage(
  browser: Browser,
  baseUrl: string,
  person: Pick<DemoPerson, 'email' | 'password'>,
): Promise<{ page: Page; context: BrowserContext }> {
  const context = await browser.newContext({ baseURL: baseUrl, acceptDownloads: true, locale: 'en-GB' });
  context.setDefaultTimeout(30_000);
  const { email, password } = person;
  const answer = await context.request.post('/api/auth/sign-in', { data: { email, password } });
  expect(answer.status()).toBe(200);
  return { page: await context.newPage(), context };
}

/** Fails on any serious or critical finding of WCAG 2.2 A and AA. */
export async function expectAccessible(page: Page): Promise<void> {
  const { violations } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'])
    .analyze();
  const grave = violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .map(({ id, nodes }) => `${id}: ${nodes.map((node) => node.target.join(' ')).join('; ')}`);
  expect(grave).toEqual([]);
}

/** Keeps a picture of the page for whoever looks into a failed run. */
export async function keepPicture(page: Page, name: string): Promise<void> {
  const directory = process.env.REPORT_DIR;
  if (!directory) return;
  mkdirSync(directory, { recursive: true });
  await page.screenshot({ path: join(directory, `${name}.png`), fullPage: true });
}
