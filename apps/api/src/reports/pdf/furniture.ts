import type { Report } from '@overtally/contracts';
import { formatDate } from './format.js';
import { drawMark } from './mark.js';
import type { Sheet } from './sheet.js';
import { colours, hairline, page, text, textWidth, tinted } from './theme.js';
import { laboratoryName } from './words.js';

const stripTop = page.height - 60;
const stripHeight = 27;

/** Number and revision as each page carries them: "HR-0001, revision 0". */
export const reportMark = (report: Report): string =>
  `${report.number ?? 'unnumbered'}, revision ${report.revision}`;

const isIssued = (report: Report): boolean => report.status === 'issued' || report.status === 'superseded';

/** A file of a superseded revision is the one that was issued: it says so as it did then. */
const stampOf = (report: Report): string =>
  isIssued(report) ? 'ISSUED' : report.status === 'in-review' ? 'DRAFT, IN REVIEW' : 'DRAFT';

/** Runs along every page once all are drawn: number, revision, page of pages, and DRAFT while it is one. */
export function drawFurniture(sheet: Sheet, report: Report): void {
  const { start, count } = sheet.doc.bufferedPageRange();
  for (let index = 0; index < count; index += 1) {
    sheet.doc.switchToPage(start + index);
    sheet.doc.markContent('Artifact', { type: 'Pagination' });
    if (index > 0) drawRunningHead(sheet, report);
    drawStrip(sheet, report, index + 1, count);
    drawStamp(sheet, report);
    if (!isIssued(report)) drawSpine(sheet, report);
    sheet.doc.endMarkedContent();
  }
}

function drawRunningHead(sheet: Sheet, report: Report): void {
  sheet.line(report.title, text.caption, page.left, 36, { width: textWidth - 110 });
  sheet.doc
    .lineWidth(hairline)
    .moveTo(page.left, 54)
    .lineTo(page.left + textWidth, 54)
    .stroke(colours.ruleStrong);
}

interface StripCell {
  caption: string;
  value: string;
  share: number;
  strong?: boolean;
}

/** The title strip at the foot, as on an engineering drawing. */
function drawStrip(sheet: Sheet, report: Report, number: number, count: number): void {
  const cells: StripCell[] = [
    { caption: 'Laboratory', value: laboratoryName(report.content), share: 2.6 },
    { caption: 'Report', value: reportMark(report), share: 2.3, strong: true },
    {
      caption: isIssued(report) ? 'Issued' : 'Status',
      value: isIssued(report)
        ? formatDate(report.issuedAt)
        : report.status === 'in-review'
          ? 'DRAFT, in review'
          : 'DRAFT',
      share: 1.6,
    },
    { caption: 'Page', value: `page ${number} of ${count}`, share: 1.2, strong: true },
  ];
  const { doc } = sheet;
  const markWidth = 34;
  drawMark(doc, page.left + 8, stripTop + 8, 10);
  const whole = cells.reduce((sum, { share }) => sum + share, 0);
  let x = page.left + markWidth;
  for (const { caption, value, share, strong } of cells) {
    const width = (share / whole) * (textWidth - markWidth);
    doc.moveTo(x, stripTop).lineTo(x, stripTop + stripHeight);
    doc.lineWidth(hairline).stroke(colours.ruleStrong);
    sheet.line(caption, text.tiny, x + 5, stripTop + 4.5, { width: width - 10 });
    sheet.line(value, strong ? text.stripStrong : text.strip, x + 5, stripTop + 12.5, { width: width - 10 });
    x += width;
  }
  doc.lineWidth(1).rect(page.left, stripTop, textWidth, stripHeight).stroke(colours.ink);
}

/** The stamp at the upper right: vermilion while nothing is decided, ink-blue once issued. */
function drawStamp(sheet: Sheet, report: Report): void {
  const colour = isIssued(report) ? colours.act : colours.over;
  const words = stampOf(report);
  const style = tinted({ ...text.strong, size: 8 }, colour);
  const width = sheet.widthOf(words, style) + 14;
  const x = page.left + textWidth - width;
  sheet.doc.lineWidth(1).roundedRect(x, 32, width, 15, 2).stroke(colour);
  sheet.line(words, style, x, 34.7, { width, align: 'center' });
}

/** Written upright along the left edge, so that no single sheet can pass for an issued one. */
function drawSpine(sheet: Sheet, report: Report): void {
  const words = `DRAFT, not issued: ${report.status === 'in-review' ? 'in review' : 'may still change'}`;
  const style = tinted({ ...text.strong, size: 10 }, colours.over);
  const middle = page.height / 2;
  sheet.doc.save().rotate(-90, { origin: [30, middle] });
  sheet.line(words, style, 30 - 150, middle - 7, { width: 300, align: 'center' });
  sheet.doc.restore();
}
