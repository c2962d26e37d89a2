import type { Report } from '@overtally/contracts';
import { replacementCharacter } from './fonts.js';
import { formatMoment } from './format.js';
import type { Sheet } from './sheet.js';
import { text } from './theme.js';
import { drawTitleBlock } from './title-block.js';

const cautions = [
  'The results hold for the recordings named here alone, as they were captured with the measuring chain stated.',
  'A verdict in this report is not a certificate by an accredited body unless the laboratory that issues it is one.',
  'Limit tables state their edition and source. Whether that edition is the current one, and applies to the equipment, is for the reader to check.',
  'Mains voltage can kill. Measurements on mains are for qualified persons with rated probes and isolation; local codes and the licensed practitioner decide.',
];

/** Last part: what the results do not say, and who stands for them. */
export function drawClosing(sheet: Sheet, report: Report): void {
  sheet.room(270);
  sheet.heading('Cautions', 40, 'H2');
  for (const caution of cautions) {
    sheet.paragraph(caution, text.cell);
    sheet.y += 4;
  }
  if (sheet.fonts.replaced) {
    sheet.paragraph(
      `${replacementCharacter} stands for a character that the fonts of this report do not have; the stored text has it.`,
      text.cell,
    );
  }
  sheet.heading('Signatures', 100, 'H2');
  drawTitleBlock(sheet, [
    [
      { caption: 'Prepared by', value: report.preparedBy.name },
      { caption: 'Issued by', value: report.issuedBy?.name ?? 'not issued' },
    ],
    [
      { caption: 'Prepared', value: formatMoment(report.createdAt) },
      { caption: 'Issued', value: formatMoment(report.issuedAt) },
    ],
    [
      { caption: 'Signature', value: '\n\n ' },
      { caption: 'Signature', value: '\n\n ' },
    ],
  ]);
}
