import { refuse } from '../refusal.js';
import type { ImportOptions } from '../types.js';
import { sniffDialect } from './dialect.js';

const CURE_TABLE = 'Export the record as a table of numbers: one row per sample, one column per channel.';

/** Refuses text without a table of numbers, saying which of the possible reasons it is. */
export function refuseNoTable(lines: string[], fileName: string, options: ImportOptions): never {
  if (/\.(wav|wave|rf64)$/i.test(fileName)) {
    refuse(
      'not-riff',
      `"${fileName}" is named like a WAV file but does not begin with a RIFF or RF64 header, and it is no table of numbers.`,
      'Upload the WAV file as the recorder wrote it.',
    );
  }
  const { delimiter, decimal, headerRows, ...rest } = options;
  const stated = [delimiter, decimal, headerRows].some((option) => option !== undefined);
  if (stated && sniffDialect(lines, rest) !== null) {
    refuse(
      'options-do-not-fit',
      'With the delimiter, decimal mark and header rows that were given, the file holds no rows of numbers.',
      'Leave these settings to detection, or correct them.',
    );
  }
  const filled = lines.filter((line) => line.trim() !== '');
  if (filled.length === 0) {
    refuse('empty-file', `"${fileName}" is empty: it holds no data but blank lines.`, CURE_TABLE);
  }
  const [first = ''] = filled;
  const isHeader = filled.length <= 2 && /^[^{<]*[;,\t|]/.test(first) && !/[.!?]\s*$/.test(first);
  if (isHeader) {
    refuse(
      'no-samples',
      `"${fileName}" holds only a header: there are no rows of numbers after line ${lines.lastIndexOf(filled.at(-1) ?? '') + 1}.`,
      'Check that the export of the instrument had finished, then upload the file again.',
    );
  }
  refuse(
    'no-numbers',
    `"${fileName}" is text, but no line of it holds numeric values in columns.`,
    CURE_TABLE,
  );
}
