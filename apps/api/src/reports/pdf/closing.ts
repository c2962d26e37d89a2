import type { Report } from '@overtally/contracts';
import { replacementCharacter } from './fonts.js';
import { reportMark } from './furniture.js';
import type { Sheet } from './sheet.js';
import { boldLine, colours, text } from './theme.js';

const cautions = [
  'The results hold for the recordings named here alone, as they were captured with the measuring chain stated.',
  'A verdict in this report is not a certificate by an accredited body unless the laboratory that issues it is one.',
  'Limit tables state their edition and source. Whether that edition is the current one, and applies to the equipment, is for the reader to check.',
  'Mains voltage can kill. Measurements on mains are for qualified persons with rated probes and isolation; local codes and the licensed practitioner decide.',
];

/** Last part: what the results do not say, and the mark that nothing follows. */
export function drawClosing(sheet: Sheet, report: Report): void {
  sheet.heading('Cautions', 130, 'H2');
  sheet.list([
    ...cautions,
    ...(sheet.fonts.replaced
      ? [
          `${replacementCharacter} stands for a character that the fonts of this report do not have; the stored text, and the report as data, have it.`,
        ]
      : []),
  ]);
  sheet.room(30);
  sheet.y += 12;
  sheet.rule(sheet.y, boldLine, colours.ink);
  sheet.y += 6;
  sheet.paragraph(`End of report ${reportMark(report)}`, text.kicker, 'P', { align: 'center' });
}
