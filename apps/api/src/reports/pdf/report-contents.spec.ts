import type { Report, ReportSection } from '@overtally/contracts';
import jsqr from 'jsqr';
import { beforeAll, describe, expect, it } from 'vitest';
import { pageAsPixels, pagesOfPdf, wordsOfPdf } from '../../../test/support/pdf-reading.js';
import {
  dimmerChannel,
  exampleReport,
  exampleSection,
  idFor,
  noteOn,
} from '../../../test/support/report-example.js';
import { renderReportPdf } from './render-report.js';

const checkUrl = 'https://reports.example/check/HR-0001/7Q2M-K0ZV-1RXA-9D4H';
const render = (report: Report) => renderReportPdf(report, { checkUrl, between: () => undefined });

type Chain = NonNullable<ReportSection['chain']>;

const instrument = (
  name: string,
  dueOn: string,
  state: 'valid' | 'overdue',
): Chain['instruments'][number] => ({
  ...{ id: idFor(name), kind: 'recorder', name, manufacturer: 'Nordlab', model: 'M4', serialNumber: '118' },
  calibration: {
    ...{ id: idFor(`calibration of ${name}`), instrumentId: idFor(name), calibratedOn: '2026-02-03', dueOn },
    ...{ certificateNumber: 'K-26-0117', calibratedBy: 'Justervesenet', uncertainty: '0.12 %, k = 2' },
    ...{ remark: '', certificate: null, createdAt: '2026-02-04T00:00:00.000Z' },
  },
  calibrationState: state,
});

/** A section in which everything that can be stated is stated. */
function fullSection(): ReportSection {
  const section = exampleSection({
    parameters: { expandedUncertaintyPercent: 2 },
    decisionRule: 'guarded-acceptance',
    notes: [noteOn(15, 'Follows the firing angle.', 'Phase control')],
  });
  return {
    ...section,
    verdict: {
      ...section.verdict,
      supply: {
        ...{ channel: 1, channelName: 'Supply voltage', nominalV: 230, frequencyHz: 50, result: 'fail' },
        ...{ assumption: 'Taken as 230 V, since none was stated', summary: 'Order 3 is too high' },
        checks: [{ name: 'Harmonic order 3', unit: '%', value: 1.21, from: null, upTo: 0.9, result: 'fail' }],
      },
      repeats: [1, 2].map((repeat) => ({
        ...{ analysisId: idFor(`a${repeat}`), recordingId: idFor(`r${repeat}`), channel: 0 },
        ...{ recordingNumber: `R-020${repeat}`, result: 'fail', reason: 'Over at 15' },
      })),
      repeatability: {
        isRepeatable: false,
        orders: [{ order: 15, count: 2, repeatabilityPercent: 6.25, deviationPercent: 4.42 }],
      },
    },
    equipment: {
      ...{ id: idFor('dimmer'), name: 'Dimmer DM-4', manufacturer: 'Halden Lighting AS', model: 'DM-4/230' },
      ...{
        serialNumber: '0031',
        ratings: { voltageV: 230, frequencyHz: 50, currentA: 4, emissionClass: 'A' },
      },
      ...{ receivedOn: '2026-11-20', remark: 'Undamaged' },
    },
    operatingMode: { id: idFor('mode'), name: '40 % setting', description: 'Resistive load of 860 W' },
    chain: {
      ...{ id: idFor('chain'), name: 'Current chain 2', description: '', calibrationState: 'overdue' },
      instruments: [
        instrument('Shunt', '2027-02-03', 'valid'),
        instrument('Amplifier', '2026-11-03', 'overdue'),
      ],
    },
    conditions: { ambientTemperatureC: 22.5, relativeHumidityPercent: 41, place: 'Bench 2, Halden' },
  };
}

function fullReport(): Report {
  const report = exampleReport([fullSection()], {
    ...{ revision: 1, replaces: { id: idFor('revision 0'), revision: 0, status: 'issued' } },
    deviations: 'The observation lasted 30 s.',
    overdueReason: 'Found within its limits as received in December.',
    checkCode: '7Q2M-K0ZV-1RXA-9D4H',
  });
  report.content.revisionReason = 'The operating mode was named wrongly.';
  report.content.laboratory = {
    ...{ name: 'Halden EMC laboratory', address: 'Kanalgata 4, 1767 Halden', contact: 'lab@halden.example' },
    accreditation: '',
  };
  return report;
}

let pdf: Buffer;
let pages: string[];
let words: string;
beforeAll(async () => {
  pdf = await render(fullReport());
  pages = pagesOfPdf(pdf);
  words = wordsOfPdf(pdf);
}, 60_000);

/** ISO/IEC 17025:2017, 7.8.2.1 a) to p), 7.8.3.1, 7.8.4.1, 7.8.6.2, 7.8.8.3: what a test report has to state. */
describe('what a test report must state', { timeout: 60_000 }, () => {
  it.each([
    ['a) title', ['Harmonic test report', 'Harmonic current of dimmer DM-4']],
    ['b) laboratory', ['Halden EMC laboratory', 'Kanalgata 4, 1767 Halden', 'lab@halden.example']],
    ['c) place of the activities', ['Place of the activities', 'Bench 2, Halden']],
    ['d) identification, and the end', ['HR-0001, revision 1', 'End of report HR-0001, revision 1']],
    ['e) customer and contact', ['Halden Lighting AS', 'Kanalgata 4, Halden']],
    ['f) methods', ['IEC 61000-4-7:2002', 'IEC 61000-3-2', 'first-order low-pass of 1.5 s']],
    ['g) item', ['Dimmer DM-4', 'DM-4/230', '0031', '230 V, 50 Hz, 4 A, class A', 'Undamaged']],
    ['h) receipt, and sampling', ['20 Nov 2026', 'No sampling plan or method applies']],
    ['i) dates of the test', ['Dates of the test', '26 Nov 2026']],
    ['j) date of issue', ['Date of issue', '28 Nov 2026']],
    ['k) sampling plan', ['tested as they were received']],
    ['l) scope', ['The results relate only to the items tested']],
    ['m) results with units', ['170.1 mA', '113.4 %']],
    ['n) deviations', ['Deviations from the methods', 'The observation lasted 30 s.']],
    ['o) persons who authorise', ['Prepared by', 'Ines Halden', 'authorised for issue by', 'Maren Lund']],
    ['p) external providers', ['No result is stated to come from an external provider.']],
    ['reproduction', ['may not be reproduced except in full']],
    ['accreditation', ['None is claimed']],
    ['test conditions', ['22.5 °C', 'relative humidity 41 %', '40 % setting', 'Resistive load of 860 W']],
    ['uncertainty', ['2 % of its value, k = 2, a level of confidence of about 95 %']],
    ['statement of conformity and rule', ['Fail', 'Guarded acceptance (ILAC-G8:09/2019, 4.2.2)']],
    ['traceability', ['K-26-0117', '3 Feb 2026', '3 Nov 2026', 'OVERDUE', '0.12 %, k = 2']],
    ['overdue calibration', ['Found within its limits as received in December.']],
    ['amendment', ['replaces revision 0 of HR-0001', 'The operating mode was named wrongly.']],
    ['supply', ['Supply voltage does not meet', '1.210 %', '0.9000 %', 'not met', 'Taken as 230 V']],
    ['repeats', ['R-0201', 'R-0202', 'do not agree within the repeatability', '6.25 %', '4.42 %']],
  ])('%s', (_item, expected) => {
    for (const part of expected) expect(words).toContain(part);
  });

  it('says so where something is not known', async () => {
    const bare = wordsOfPdf(await render(exampleReport([exampleSection()])));
    for (const part of ['Laboratory not stated', 'Address not stated', 'Received: not stated', 'no chain']) {
      expect(bare).toContain(part);
    }
  });

  it('stands identified on each page, with the end marked on the last alone', () => {
    pages.forEach((page, index) => {
      expect(page).toContain('HR-0001, revision 1');
      expect(page).toContain(`page ${index + 1} of ${pages.length}`);
      expect(page.includes('End of report')).toBe(index === pages.length - 1);
    });
  });
});

describe('the QR code', { timeout: 60_000 }, () => {
  it('is read by an independent decoder as the address of the check page', () => {
    const page = pages.findIndex((text) => text.includes('Check this report')) + 1;
    const { data, width, height } = pageAsPixels(pdf, page, 150);
    expect(jsqr.default(data, width, height)?.data).toBe(checkUrl);
    expect(words).toContain(checkUrl);
  });

  it('is left out while there is no address', async () => {
    const draft = exampleReport([exampleSection()], { status: 'draft', number: null });
    const bytes = await renderReportPdf(draft, { checkUrl: null, between: () => undefined });
    expect(wordsOfPdf(bytes)).toContain('given when the report is issued');
  });
});

/** Structure types, attributes and catalog entries: ISO 32000-1, 14.8.4, 14.8.5.7, 14.9, 12.3.3. */
describe('the structure for readers that cannot see the page', () => {
  const source = () => pdf.toString('latin1');

  it('has language, title in the window, marked content and an outline', () => {
    for (const entry of ['/Lang (en-GB)', '/DisplayDocTitle true', '/Marked true', '/Outlines']) {
      expect(source()).toContain(entry);
    }
  });

  it.each(['H1', 'H2', 'H3', 'P', 'L', 'LI', 'LBody', 'Table', 'THead', 'TBody', 'TR', 'TH', 'TD', 'Figure'])(
    'has %s',
    (type) => expect(source()).toMatch(new RegExp(`/S /${type}\\b`)),
  );

  it('has a scope for each header cell and words for each figure', () => {
    const objects = source().split('endobj');
    const headers = objects.filter((object) => /\/S \/TH\b/.test(object));
    const figures = objects.filter((object) => /\/S \/Figure\b/.test(object));
    expect(headers.length).toBeGreaterThan(20);
    expect(figures.length).toBeGreaterThan(3);
    for (const header of headers) expect(header).toMatch(/\/Scope \/(Row|Column)/);
    for (const figure of figures) expect(figure).toContain('/Alt (');
  });
});

describe('reports out of the usual', { timeout: 60_000 }, () => {
  it('loses nothing of very long texts', async () => {
    const long = (start: string) =>
      `${start} ${'and more of the same '.repeat(180)}to the very end of ${start}`;
    const section = exampleSection({
      name: 'N'.repeat(160),
      notes: [noteOn(3, long('note').slice(0, 2000))],
    });
    const report = exampleReport([section], { summary: long('summary'), deviations: long('deviations') });
    const text = wordsOfPdf(await render(report));
    expect(text).toContain('to the very end of summary');
    expect(text).toContain('to the very end of deviations');
    for (const page of pagesOfPdf(await render(report))) expect(page).toMatch(/page \d+ of \d+/);
  });

  it('prints each of 200 orders', async () => {
    const section = exampleSection({ channel: dimmerChannel() });
    const [first] = section.verdict.orders;
    const orders = Array.from({ length: 199 }, (_, index) => ({ ...first!, order: index + 2, mean: 0.5 }));
    section.verdict = { ...section.verdict, orders };
    const text = pagesOfPdf(await render(exampleReport([section]))).join('\n');
    const printed = [...text.matchAll(/^ +(\d+) +500\.0 mA /gm)].map((match) => Number(match[1]));
    expect(printed).toEqual(orders.map(({ order }) => order));
  });
});
