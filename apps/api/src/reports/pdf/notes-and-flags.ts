import type { Flag, Note, ReportSection } from '@overtally/contracts';
import { formatDate, formatFigure, formatQuantity, noteLetter } from './format.js';
import type { Sheet } from './sheet.js';
import { colours, text, tinted } from './theme.js';
import { isOver } from './words.js';

const indent = 16;

const severityColours: Record<Flag['severity'], string> = {
  info: colours.inkSoft,
  warning: colours.near,
  error: colours.over,
};
const severityNames: Record<Flag['severity'], string> = {
  info: 'For information',
  warning: 'Warning',
  error: 'Error',
};

/** What the analysis noticed about the record. */
export function drawFlags(sheet: Sheet, flags: readonly Flag[]): void {
  if (flags.length === 0) return;
  sheet.heading('Flags of the analysis', 24);
  for (const flag of flags) {
    sheet.room(26);
    const colour = severityColours[flag.severity];
    sheet.paragraph(severityNames[flag.severity], tinted(text.cellStrong, colour));
    sheet.paragraph(flag.message, text.cell);
    sheet.y += 5;
  }
}

/** The analyst's notes, lettered as in the figure and in its colours. */
export function drawNotes(sheet: Sheet, { notes, verdict }: ReportSection): void {
  if (notes.length === 0) return;
  const over = new Set(verdict.orders.filter(({ result }) => isOver(result)).map(({ order }) => order));
  sheet.heading('Notes', 36);
  notes.forEach((note, index) => {
    const { target } = note;
    const colour = target.kind === 'order' && over.has(target.order) ? colours.over : colours.ink;
    sheet.room(38);
    const top = sheet.y;
    const column = { x: sheet.left + indent, width: sheet.width - indent };
    sheet.tag('P', () => {
      sheet.line(noteLetter(index), tinted(text.cellStrong, colour), sheet.left, top);
      sheet.flow(targetName(note), text.cellStrong, { ...column, y: top });
    });
    sheet.paragraph(note.text, text.cell, 'P', column);
    if (note.cause.trim() !== '') sheet.paragraph(`Cause: ${note.cause}`, text.cell, 'P', column);
    sheet.paragraph(`${note.author.name}, ${formatDate(note.createdAt)}`, text.caption, 'P', column);
    sheet.y += 6;
  });
}

function targetName({ target }: Note): string {
  if (target.kind === 'order') return `Order ${target.order}`;
  if (target.kind === 'line') return `Line at ${formatQuantity(target.frequencyHz, 'Hz')}`;
  return `From ${formatFigure(target.fromS)} s to ${formatFigure(target.toS)} s`;
}
