import type { ReportSection } from '@overtally/contracts';
import { execFileSync } from 'node:child_process';
import { expect, it } from 'vitest';
import { renderReportPdf } from '../dist/reports/pdf/render-report.js';
import { exampleReport, exampleSection } from '../test/support/report-example.js';

const sections = 40;
const points = 800;
/** What the house asks for: 100 pages in under 10 s on two cores. */
const secondsPer100Pages = 10;

function sectionWithFigures(number: number): ReportSection {
  const values = Array.from({ length: points }, (_, index) => 5 * Math.sin(index / 30));
  const times = Array.from({ length: 400 }, (_, index) => index * 0.2);
  return {
    ...exampleSection({ number: `R-${number}`, parameters: { expandedUncertaintyPercent: 3 } }),
    waveform: {
      ...{ unit: 'A', kind: 'envelope', startS: 0, stepS: 1e-4, values: [] },
      ...{ minimum: values, maximum: values.map((value) => value + 0.1) },
    },
    distortion: {
      ...{ unit: '%', intervalS: 0.2, thinned: false, timeS: times },
      value: times.map((time) => 60 + Math.sin(time)),
    },
  };
}

it(`draws a report of ${sections} sections`, async () => {
  const report = exampleReport(
    Array.from({ length: sections }, (_, index) => sectionWithFigures(1000 + index)),
  );
  const checkUrl = 'https://reports.example/check/HR-0001/7Q2M-K0ZV-1RXA-9D4H';
  const used = process.cpuUsage();
  const start = performance.now();
  const pdf = await renderReportPdf(report, { checkUrl, between: () => undefined });
  const seconds = (performance.now() - start) / 1000;
  const { user, system } = process.cpuUsage(used);
  const info = execFileSync('pdfinfo', ['-'], { input: pdf, encoding: 'utf8' });
  const pages = Number(/Pages: +(\d+)/.exec(info)?.[1]);
  const cpu = (user + system) / 1e6;
  console.log(
    `${pages} pages in ${seconds.toFixed(1)} s (${cpu.toFixed(1)} s of processor time), ` +
      `${(pdf.length / 1e6).toFixed(1)} MB, ${Math.round(process.memoryUsage().rss / 1e6)} MB resident`,
  );
  expect((100 * seconds) / pages).toBeLessThan(secondsPer100Pages);
});
