import { studyPageSchema, studySchema } from '@overtally/contracts';
import type { Browser, BrowserContext, Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { expectAccessible, keepPicture, launchBrowser, signedInPage } from './support/browser.js';
import { analysedDemo } from './support/demo.js';
import { personOf, startProduct, type Product } from './support/product.js';

let product: Product;
let browser: Browser;
let context: BrowserContext;
let page: Page;
let demo: Awaited<ReturnType<typeof analysedDemo>>;

const name = 'Low-pass in front of the dimmer';

beforeAll(async () => {
  [product, browser] = await Promise.all([startProduct(), launchBrowser()]);
  demo = await analysedDemo(browser, product.baseUrl);
  ({ page, context } = await signedInPage(browser, product.baseUrl, personOf('analyst')));
});

afterAll(async () => {
  await browser?.close();
  await product?.stop();
});

const addStage = async (label: string) => {
  await page.getByLabel('Kind of the next stage').selectOption({ label });
  await page.getByRole('button', { name: 'Add stage' }).click();
};
const behind = () => page.getByRole('region', { name: 'Predicted behind' });
const before = () => page.getByRole('region', { name: 'Before', exact: true });

describe('a study', () => {
  it('begins with a channel of a recording and its phases', async () => {
    await page.goto(`/projects/${demo.projectId}/recordings/${demo.recordingId}?channel=1`);
    await page.getByRole('link', { name: 'Predict behind stages' }).click();
    await page.getByRole('heading', { name: 'New study', level: 1 }).waitFor();
    await page.getByText(/rms of its single line with its phase/).waitFor();
    await page.getByLabel('Limits', { exact: true }).selectOption({ label: 'IEC 61000-3-2, class A' });
    // Phase control at 90° of a resistive load: orders 15, 17 and 19 are over class A, Fourier integral.
    await before().getByText('Fail', { exact: true }).waitFor();
    // No stage: what comes in goes out.
    await behind().getByText('Fail', { exact: true }).waitFor();
  });

  it('finds the smallest value with which the verdict passes, and takes it', async () => {
    await addStage('Low-pass of first order');
    await page.getByRole('button', { name: 'Open Smallest value for a goal' }).click();
    await page.getByLabel('Value', { exact: true }).selectOption({ label: '1. Low-pass of first order: τ' });
    const from = page.getByLabel('From', { exact: true });
    await from.fill('1 µs');
    await from.blur();
    await page.getByRole('button', { name: 'Search', exact: true }).click();
    await page.getByText(/The smallest that does; just below/).waitFor();
    await page.getByRole('button', { name: 'Take this value' }).click();
    await behind().getByText('Pass', { exact: true }).waitFor();
    expect(await before().getByText('Fail', { exact: true }).count()).toBe(1);
    await expectAccessible(page);
    await keepPicture(page, 'study');
  });

  it('computes the share of random draws that pass in a thread of its own', async () => {
    await page.getByRole('button', { name: 'Open Tolerances' }).click();
    const tolerance = page.getByLabel('Tolerance of 1. Low-pass of first order: τ in percent');
    await tolerance.fill('20');
    await tolerance.blur();
    await page.getByRole('button', { name: 'Compute the spread' }).click();
    await page.getByText(/1000 draws with seed 1; .* pass, /).waitFor({ timeout: 60_000 });
  });

  it('draws anew while a slider moves', async () => {
    const times = await page.evaluate(slide);
    const sorted = times.toSorted((a, b) => a - b);
    const at = (share: number) => sorted[Math.floor(share * (sorted.length - 1))] ?? Number.NaN;
    console.log(
      `Slider to redraw over ${sorted.length} moves: median ${at(0.5).toFixed(1)} ms, 95th percentile ${at(0.95).toFixed(1)} ms`,
    );
    expect(sorted).toHaveLength(60);
  });

  it('refuses a loop that is unstable, with its poles, and shows no figure behind it', async () => {
    await page.goto(`/projects/${demo.projectId}/studies/new`);
    page.once('dialog', (dialog) => void dialog.accept());
    await addStage('Closed loop');
    const fill = async (label: string, value: string, nth = 0) => {
      const field = page.getByLabel(label, { exact: true }).nth(nth);
      await field.fill(value);
      await field.blur();
    };
    const tau = (part: number) => `τ, time constant, of plant ${part} of stage 1`;
    await fill('Ti in s', '');
    await fill(tau(1), '1 ms');
    for (let part = 2; part <= 3; part++) {
      await page.getByLabel('Add to the plant of stage 1').selectOption({ label: 'Low-pass of first order' });
      await page.getByRole('button', { name: 'Add to the plant' }).click();
    }
    await behind().waitFor();
    await fill('Kp', '64');
    await page.getByRole('heading', { name: 'Unstable: no steady state' }).waitFor();
    // (1 + sτ)³ = −64 with τ = 1 ms: 1 + sτ = 4 e^(±jπ/3), so s = 1000 ± j 3464 1/s.
    await page.getByText('s = 1000 + j 3464 1/s').waitFor();
    await page.getByText('s = 1000 − j 3464 1/s').waitFor();
    await page.getByRole('button', { name: 'Open the Routh table' }).click();
    await page.getByText(/2 changes of sign in the first column/).waitFor();
    expect(await page.getByText(/THD to order \d/).count()).toBe(0);
    for (const title of ['Harmonics before and behind', 'Waveform over two cycles', 'Frequency response'])
      expect(await page.getByRole('heading', { name: title }).count()).toBe(0);
    await expectAccessible(page);
    await keepPicture(page, 'study-unstable');
    // At a gain of 1 the same loop is stable again (the border is at 8).
    await fill('Kp', '1');
    await behind().waitFor();
  });

  it('is saved, and what somebody else saved meanwhile is not written over', async () => {
    await page.getByRole('button', { name: 'Save study' }).click();
    await page.getByRole('dialog').getByLabel('Name').fill(name);
    await page.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click();
    await page.getByRole('heading', { name, level: 1 }).waitFor();
    const { items } = studyPageSchema.parse(
      await (await context.request.get(`/api/projects/${demo.projectId}/studies`)).json(),
    );
    const saved = items.find((study) => study.name === name);
    const { definition, version } = studySchema.parse(
      await (await context.request.get(`/api/studies/${saved?.id}`)).json(),
    );
    const other = await context.request.post(`/api/studies/${saved?.id}/versions`, {
      data: {
        definition: { ...definition, assumptions: 'Said by somebody else' },
        comment: '',
        basedOn: version,
      },
    });
    expect(other.status()).toBe(201);
    await page.getByLabel('Assumptions').fill('Said here');
    await page.getByRole('button', { name: 'Save version' }).click();
    await page.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click();
    await page.getByText(/Somebody saved another version meanwhile/).waitFor();
    await page.getByRole('button', { name: 'Keep mine as new study' }).click();
    await page.getByRole('dialog').getByLabel('Name').fill(`${name}, mine`);
    await page.getByRole('dialog').getByRole('button', { name: 'Save', exact: true }).click();
    await page.getByRole('heading', { name: `${name}, mine`, level: 1 }).waitFor();
    expect(await page.getByLabel('Assumptions').inputValue()).toBe('Said here');
    await page.goto(`/projects/${demo.projectId}/studies`);
    await page.getByRole('link', { name, exact: true }).waitFor();
    await expectAccessible(page);
  });
});

/** Moves the slider of τ 60 times; time from each move until the curve is drawn and its frame over, in ms. */
async function slide(): Promise<number[]> {
  const slider = document.querySelector<HTMLInputElement>('input[type=range][aria-label^="τ of stage 1"]');
  const chart = document.querySelector('[aria-label^="Gain over frequency"]');
  if (!slider || !chart) throw new Error('The slider or the curve is not there');
  const setValue = Object.getOwnPropertyDescriptor(HTMLInputElement.prototype, 'value')?.set;
  const times: number[] = [];
  for (let move = 0; move < 60; move++) {
    const drawn = new Promise<number>((resolve) => {
      const observer = new MutationObserver(() => {
        observer.disconnect();
        requestAnimationFrame(() => {
          const after = new MessageChannel();
          after.port1.onmessage = () => resolve(performance.now());
          after.port2.postMessage(null);
        });
      });
      observer.observe(chart, { subtree: true, attributes: true, attributeFilter: ['d'] });
    });
    const start = performance.now();
    setValue?.call(slider, String(100 + 2 * move));
    slider.dispatchEvent(new Event('input', { bubbles: true }));
    times.push((await drawn) - start);
  }
  return times;
}
