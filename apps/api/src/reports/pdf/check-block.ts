import type { Report } from '@overtally/contracts';
import { encode } from 'uqr';
import { reportMark } from './furniture.js';
import type { Sheet } from './sheet.js';
import { colours, text } from './theme.js';

/** Light modules around a QR code: ISO/IEC 18004, 6.3.8, asks for four. */
const quietZone = 4;
const size = 100;
const gap = 16;

/** How a reader tells that this is the report that was issued: number, code, address, and both as a QR code. */
export function drawCheckBlock(sheet: Sheet, report: Report, checkUrl: string | null): void {
  sheet.heading('Check this report', checkUrl === null ? 40 : size + 10, 'H2');
  if (checkUrl === null) {
    sheet.paragraph('Number and check code are given when the report is issued.', text.soft);
    return;
  }
  const top = sheet.y;
  drawQrCode(sheet, checkUrl, sheet.left, top);
  const place = { x: sheet.left + size + gap, width: sheet.width - size - gap };
  sheet.y = top + 6;
  sheet.paragraph(reportMark(report), text.strong, 'P', place);
  sheet.y += 3;
  sheet.paragraph(`Check code ${report.checkCode ?? ''}`, { ...text.figureStrong, size: 11 }, 'P', place);
  sheet.y += 3;
  drawAddress(sheet, checkUrl, place);
  sheet.y += 5;
  sheet.paragraph(
    'The page at this address tells the date of issue, whether this revision is current or superseded, and the SHA-256 of the file. Drop the file there to see whether it is the one that was issued.',
    text.soft,
    'P',
    place,
  );
  sheet.y = Math.max(sheet.y, top + size);
}

/** The address as a link; its text is all it takes to follow it from paper. */
function drawAddress(sheet: Sheet, checkUrl: string, place: { x: number; width: number }): void {
  const top = sheet.y;
  sheet.paragraph(checkUrl, { ...text.figure, colour: colours.act }, 'P', place);
  const { doc } = sheet;
  doc.link(place.x, top, place.width, sheet.y - top, checkUrl, {
    Contents: new String(`Check page of this report: ${checkUrl}`),
  } as PDFKit.Mixins.AnnotationOption);
}

/** The QR code (level M) as filled rows of modules, sharp at any size. */
function drawQrCode(sheet: Sheet, checkUrl: string, x: number, y: number): void {
  const { data } = encode(checkUrl, { ecc: 'M', border: quietZone });
  const module = size / data.length;
  sheet.tag(
    'Figure',
    () => {
      data.forEach((row, line) => {
        let start = -1;
        [...row, false].forEach((dark, column) => {
          if (dark && start < 0) start = column;
          if (dark || start < 0) return;
          sheet.doc.rect(x + start * module, y + line * module, (column - start) * module, module);
          start = -1;
        });
      });
      sheet.doc.fill('#000000');
    },
    { alt: `QR code with the address of the check page: ${checkUrl}` },
  );
}
