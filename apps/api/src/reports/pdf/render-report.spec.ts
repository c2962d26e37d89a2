import type { Report } from '@overtally/contracts';
import { describe, expect, it } from 'vitest';
import { pagesOfPdf } from '../../../test/support/pdf-reading.js';
import {
  channelWith,
  dimmerChannel,
  exampleReport,
  exampleSection,
  noteOn,
} from '../../../test/support/report-example.js';
import { renderReportPdf as render } from './render-report.js';

const renderReportPdf = (report: Report) => render(report, { checkUrl: null, between: () => undefined });

const pagesOf = async (report: Report): Promise<string[]> => pagesOfPdf(await renderReportPdf(report));

const headOfOrders = /Order +Value( +\(k = 2\))? +mental +1\.5 s +Limit +Margin +limit +Result/;

describe('a printed report', { timeout: 30_000 }, () => {
  it('is the same to the last byte for the same report', async () => {
    const report = exampleReport([exampleSection()]);
    const [first, second] = [await renderReportPdf(report), await renderReportPdf(report)];
    expect(first.equals(second)).toBe(true);
  });

  it('repeats the head of a table that goes over a page', async () => {
    const notes = Array.from({ length: 12 }, (_, index) =>
      noteOn(index + 2, 'Seen in every run. '.repeat(6)),
    );
    const pages = await pagesOf(exampleReport([exampleSection({ notes })]));
    const withOrders = pages.filter((page) => /^ +\d+ .*(within|over|disregarded)$/m.test(page));
    expect(withOrders.length).toBeGreaterThan(1);
    for (const page of withOrders) expect(page).toMatch(headOfOrders);
  });

  it('shows the uncertainty where a verdict has one, and the rule of each recording', async () => {
    const guarded = exampleSection({
      number: 'R-0002',
      decisionRule: 'non-binary',
      parameters: { expandedUncertaintyPercent: 3 },
    });
    const pages = await pagesOf(exampleReport([exampleSection(), guarded]));
    expect(pages[0]).toContain('Simple acceptance');
    expect(pages[0]).toContain('Non-binary statement');
    expect(pages.join('\n')).toMatch(headOfOrders);
    expect(pages.join('\n')).toMatch(/Value +\(k = 2\)/);
    expect(pages.join('\n')).toContain('expanded uncertainty (k = 2) 3 %');
  });

  it('prints a dash for what is not known, never a zero', async () => {
    const section = exampleSection({
      channel: channelWith([1], {
        ...{ fundamental: null, rms: null, crestFactor: null, thdFPercent: null, windows: null },
        harmonics: [],
      }),
    });
    const bare = { eut: '', measuringChain: '', instrument: '', capturedAt: null };
    Object.assign(section.recording, bare, { sampleRateHz: null, durationS: null, metadata: {}, import: {} });
    const text = (await pagesOf(exampleReport([section]))).join('\n');
    expect(text).toMatch(
      /Equipment under test +Operating mode +Measuring chain\n+ *not stated +not stated +not stated\n/,
    );
    expect(text).toMatch(/Fundamental +rms +THD-F.*\n+ *– +– +– +–\n/);
    expect(text).toContain('No fundamental was found');
    expect(text).toContain('all detected');
  });

  it('tells a THD of single lines from the judged one of subgroups, and counts columns from 1', async () => {
    // IEC 61000-4-7, 3.3 (from memory): THD of lines, of groups and of subgroups are three figures.
    const channel = channelWith([230, 4, 8], { quantity: 'voltage', unit: 'V' });
    const section = exampleSection({ limitSetId: 'en50160.lv', channel });
    section.recording.import = { timeColumn: 0, channels: [{ column: 1, unit: 'V' }] };
    const text = (await pagesOf(exampleReport([section]))).join('\n');
    expect(text).toContain('THD-F, lines, orders 2 to 3');
    expect(text).toMatch(/Total of subgroups +Value +Limit +Share +Result\n+ *THD,/);
    expect(text).toMatch(/time in column 1; column 2 in V/);
  });

  it('shows what was measured when the limits are for another quantity', async () => {
    const section = exampleSection({ limitSetId: 'en50160.lv' });
    const text = (await pagesOf(exampleReport([section]))).join('\n');
    expect(text).toContain('Not applicable');
    expect(text).not.toMatch(headOfOrders);
  });

  it('keeps Greek, Cyrillic and long names, and marks a sign that its fonts lack', async () => {
    const name = 'Ω-Lade­gerät Жук, µ-Steuerung 測 '.repeat(5).trim();
    const channel = dimmerChannel({ name: 'Leiter 測' });
    const text = (await pagesOf(exampleReport([exampleSection({ name, channel })]))).join('\n');
    expect(text).toContain('Жук');
    expect(text).toContain('Ω-Lade');
    expect(text).toContain('\ufffd');
    expect(text).toContain('stands for a character');
  });
});
