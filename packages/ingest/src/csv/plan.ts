import { checkSampleRateOption, selectChannels } from '../channels.js';
import { refuse } from '../refusal.js';
import type { DetectedLayout, ImportOptions, ReadChannel } from '../types.js';
import { looksBinary, type TextEncoding, withoutControls } from './encoding.js';
import { type CsvLayout, detectLayout } from './layout.js';
import { splitLines } from './lines.js';

/** The table as understood from the head of the file, ready to be read. */
export interface CsvPlan {
  layout: CsvLayout;
  channels: ReadChannel[];
  encoding: TextEncoding;
}

/** Refuses bytes that are no text. */
function refuseBinary(text: string, fileName: string): void {
  if (!looksBinary(text)) return;
  refuse(
    'not-a-capture',
    `"${fileName}" holds binary data that is not recognised: it is not text and does not begin like a WAV, .npy or COMTRADE file.`,
    'Upload a table of numbers as text (CSV), a WAV file, a NumPy array (.npy) or a COMTRADE record (.cff).',
  );
}

/**
 * Plans the reading of a table from its first lines.
 * Refuses tables from which no sample rate can be had and options that do not fit.
 */
export function planCsv(
  text: string,
  encoding: TextEncoding,
  complete: boolean,
  args: { fileName: string; options: ImportOptions },
): CsvPlan {
  const { options, fileName } = args;
  checkSampleRateOption(options);
  refuseBinary(text, fileName);
  const lines = splitLines(withoutControls(text));
  if (!complete && lines.length > 1) lines.pop();
  const layout = detectLayout(lines, fileName, options);
  const channels = selectChannels(options, layout.columns, layout.headerCells, layout.valueColumns);
  if (channels.length === 0) {
    refuse(
      'no-channels',
      `"${fileName}" holds a time column but no column of values.`,
      'Export at least one channel beside the time.',
    );
  }
  return { layout, channels, encoding };
}

/** Refuses a table that tells nothing of its sample rate. */
export function requireSampleRate({ layout }: CsvPlan, options: ImportOptions): void {
  if (layout.time !== null || layout.statedSampleRateHz !== null || options.sampleRateHz !== undefined)
    return;
  refuseNoSampleRate('The file has no time column and states no sample rate or sample interval.');
}

export function refuseNoSampleRate(message: string): never {
  refuse('needs-sample-rate', message, 'Give the sample rate in hertz, or name the time column.');
}

/** Describes the plan in the words of the public interface. */
export function describeLayout({ layout, channels, encoding }: CsvPlan): DetectedLayout {
  const unitless = channels.filter(({ unit, quantity }) => unit === '' && quantity !== 'dimensionless');
  const names = unitless.map(({ name }) => `"${name}"`).join(', ');
  const doubts = names === '' ? layout.doubts : [...layout.doubts, `No unit is known for ${names}.`];
  return {
    format: 'csv',
    encoding,
    delimiter: layout.dialect.delimiter,
    decimal: layout.dialect.decimal,
    headerRows: layout.dialect.bodyLine,
    unitsRow: layout.unitsLine === null ? null : layout.unitsLine + 1,
    timeColumn: layout.time?.column ?? null,
    timeUnit: layout.time?.unit ?? null,
    columns: layout.columns,
    confident: doubts.length === 0,
    doubts,
  };
}
