import type { Report } from '@overtally/contracts';
import PDFDocument from 'pdfkit';
import { drawAuthorisation } from './authorisation.js';
import { drawCheckBlock } from './check-block.js';
import { drawClosing } from './closing.js';
import { drawCoverPage } from './cover-page.js';
import { drawFurniture, reportMark } from './furniture.js';
import { keepPagesAsText } from './page-text.js';
import { drawParticulars } from './particulars.js';
import { drawSection } from './section-pages.js';
import { Sheet } from './sheet.js';
import { drawStudy } from './study-pages.js';
import { page } from './theme.js';

export interface RenderOptions {
  /** Address of the check page; null until the report has a number and a code. */
  checkUrl: string | null;
  /** Called between sections; may throw to end early. */
  between: () => void;
}

/**
 * Renders a report as a tagged A4 PDF with embedded fonts.
 *
 * Everything printed comes from the report's content; nothing is computed anew. A report that is not issued is
 * marked DRAFT on each page. The same report gives the same bytes.
 */
export async function renderReportPdf(report: Report, { checkUrl, between }: RenderOptions): Promise<Buffer> {
  const doc = new PDFDocument({
    size: 'A4',
    margins: { left: page.left, right: page.right, top: page.top, bottom: page.bottom },
    bufferPages: true,
    autoFirstPage: false,
    tagged: true,
    lang: 'en-GB',
    displayTitle: true,
    pdfVersion: '1.7',
    info: {
      Title: `${reportMark(report)}: ${report.title}`,
      Author: report.issuedBy?.name ?? report.preparedBy.name,
      Subject: `Harmonic report, ${report.content.project.name}`,
      Creator: 'Overtally',
      Producer: 'Overtally',
      CreationDate: new Date(report.issuedAt ?? report.updatedAt),
    },
  });
  const bytes = collect(doc);
  keepPagesAsText(doc);
  doc.addPage();
  const sheet = new Sheet(doc);
  drawCoverPage(sheet, report);
  drawParticulars(sheet, report);
  drawAuthorisation(sheet, report);
  report.content.sections.forEach((section, index, all) => {
    between();
    drawSection(sheet, section, index, all.length);
  });
  report.content.studies.forEach((study, index, all) => {
    between();
    drawStudy(sheet, study, index, all.length);
  });
  drawCheckBlock(sheet, report, checkUrl);
  drawClosing(sheet, report);
  drawFurniture(sheet, report);
  doc.end();
  return bytes;
}

function collect(doc: PDFKit.PDFDocument): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    const chunks: Buffer[] = [];
    doc.on('data', (chunk: Buffer) => chunks.push(chunk));
    doc.on('end', () => resolve(Buffer.concat(chunks)));
    doc.on('error', reject);
  });
}
