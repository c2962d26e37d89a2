import type { Report } from '@overtally/contracts';
import { drawMark } from './mark.js';
import type { Sheet } from './sheet.js';
import { colours, hairline, page, text, textWidth, tinted } from './theme.js';
import { statusName } from './words.js';

const footTop = page.height - 42;

/** Number and revision as each page carries them: "HR-0001, revision 0". */
export const reportMark = (report: Report): string =>
  `${report.number ?? 'Not numbered yet'}, revision ${report.revision}`;

const isIssued = (report: Report): boolean => report.status === 'issued' || report.status === 'superseded';

/** Runs along every page once all are drawn: number, revision, page of pages, and DRAFT while it is one. */
export function drawFurniture(sheet: Sheet, report: Report): void {
  const { start, count } = sheet.doc.bufferedPageRange();
  for (let index = 0; index < count; index += 1) {
    sheet.doc.switchToPage(start + index);
    sheet.doc.markContent('Artifact', { type: 'Pagination' });
    if (index > 0) drawRunningHead(sheet, report);
    drawFoot(sheet, report, index + 1, count);
    drawStamp(sheet, report);
    if (!isIssued(report)) drawSpine(sheet, report);
    sheet.doc.endMarkedContent();
  }
}

function drawRunningHead(sheet: Sheet, report: Report): void {
  drawMark(sheet.doc, page.left, 37, 9);
  const room = textWidth - 130;
  sheet.line(shortened(sheet, report.title, room), text.caption, page.left + 22, 38);
  ruleAt(sheet, 54);
}

function drawFoot(sheet: Sheet, report: Report, number: number, count: number): void {
  ruleAt(sheet, footTop);
  const status = isIssued(report) ? statusName(report.status) : 'DRAFT';
  sheet.line(`${reportMark(report)}, ${status}`, text.caption, page.left, footTop + 6);
  sheet.line(shortened(sheet, report.content.project.name, 200), text.caption, page.left, footTop + 6, {
    width: textWidth,
    align: 'center',
  });
  sheet.line(`page ${number} of ${count}`, text.caption, page.left, footTop + 6, {
    width: textWidth,
    align: 'right',
  });
}

/** The stamp at the upper right: vermilion while nothing is decided, ink-blue once issued. */
function drawStamp(sheet: Sheet, report: Report): void {
  const colour = isIssued(report) ? colours.act : colours.over;
  const words = isIssued(report) ? statusName(report.status).toUpperCase() : 'DRAFT';
  const style = tinted({ ...text.strong, size: 8 }, colour);
  const width = sheet.widthOf(words, style) + 14;
  const x = page.left + textWidth - width;
  sheet.doc.lineWidth(1).roundedRect(x, 34, width, 15, 2).stroke(colour);
  sheet.line(words, style, x, 36.5, { width, align: 'center' });
}

/** Written upright along the left edge, so that no single sheet can pass for an issued one. */
function drawSpine(sheet: Sheet, report: Report): void {
  const words = `DRAFT, not issued: ${report.status === 'in-review' ? 'in review' : 'may still change'}`;
  const style = tinted({ ...text.strong, size: 10 }, colours.over);
  sheet.doc.save().rotate(-90, { origin: [28, page.height / 2] });
  sheet.line(words, style, 28 - 150, page.height / 2 - 7, { width: 300, align: 'center' });
  sheet.doc.restore();
}

const ruleAt = (sheet: Sheet, y: number): void => {
  sheet.doc
    .lineWidth(hairline)
    .moveTo(page.left, y)
    .lineTo(page.left + textWidth, y)
    .stroke(colours.rule);
};

function shortened(sheet: Sheet, words: string, width: number): string {
  let kept = words;
  while (kept.length > 1 && sheet.widthOf(kept === words ? kept : `${kept}…`, text.caption) > width) {
    kept = kept.slice(0, -1).trimEnd();
  }
  return kept === words ? words : `${kept}…`;
}
