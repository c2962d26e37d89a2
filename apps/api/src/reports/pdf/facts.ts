import type { Sheet } from './sheet.js';
import { hairline, text } from './theme.js';

/** A name with what is to be said of it; `mono` for codes and figures. */
export type Fact = [name: string, value: string, mono?: boolean];

const nameWidth = 128;
const padding = 3.5;
/** A value that is longer than this flows under its name, over pages where it must. */
const tallest = 260;

/** Names at the left, what they stand for at the right, one ruled row each. */
export function drawFacts(sheet: Sheet, facts: readonly Fact[]): void {
  const x = sheet.left + nameWidth;
  const width = sheet.width - nameWidth;
  sheet.group('Table', () => {
    for (const [name, value, mono] of facts) {
      const style = mono ? text.figure : text.cell;
      const needed = Math.max(
        sheet.heightOf(value, style, width),
        sheet.heightOf(name, text.soft, nameWidth - 8),
      );
      const height = needed + 2 * padding;
      sheet.room(Math.min(height, tallest));
      const top = sheet.y;
      sheet.group('TR', () => {
        sheet.tag('TH', () => sheet.flow(name, text.soft, { y: top + padding, width: nameWidth - 8 }), {
          scope: 'Row',
        });
        sheet.tag('TD', () => sheet.flow(value, style, { x, y: top + padding, width }));
      });
      sheet.y = height <= tallest ? top + height : sheet.y + padding;
      sheet.rule(sheet.y, hairline * 0.7);
    }
  });
}
