import { looksBinary } from '../csv/encoding.js';
import { refuse } from '../refusal.js';
import type { ImportOptions } from '../types.js';

const CURE =
  'Upload the .cfg and the .dat together, by the same name; they are joined to one file. Or combine them into one .cff file yourself: a line "--- file type: CFG ---", the whole .cfg, a line "--- file type: DAT BINARY: n ---" with n the bytes of the .dat (or "--- file type: DAT ASCII ---" when the .dat is text), then the whole .dat as it stands.';

/** The second line of a configuration: the count of channels, of analog and of status ones. */
function isConfiguration(lines: string[]): boolean {
  return /^\s*\d+\s*,\s*\d+A\s*,\s*\d+D\s*$/i.test(lines[1] ?? '');
}

/** Lines that begin with 1, 2, 3 and hold only whole numbers between commas. */
function isTextData(lines: string[]): boolean {
  const begins = [1, 2, 3].every((n) => Number.parseInt(lines[n - 1] ?? '', 10) === n);
  return begins && lines.slice(0, 3).every((line) => /^\s*\d+\s*,\s*\d*\s*(,\s*-?\d*\s*)+$/.test(line));
}

/**
 * Refuses one half of a COMTRADE record of two files, telling how to make one file of both. Data as text are known by
 * the name of the file, and taken for a table after all when the user says how time is to be had.
 */
export function refuseHalfRecord(head: Uint8Array, fileName: string, options: ImportOptions): void {
  const text = new TextDecoder('latin1').decode(head);
  const lines = text.split(/\r\n|\n|\r/);
  if (isConfiguration(lines)) {
    refuse(
      'comtrade-half',
      `"${fileName}" is the configuration of a COMTRADE record (.cfg); its samples are in the .dat file beside it.`,
      CURE,
    );
  }
  if (!/\.dat$/i.test(fileName)) return;
  const isTable = options.sampleRateHz !== undefined || options.timeColumn !== undefined;
  if (looksBinary(text) || (isTextData(lines) && !isTable)) {
    refuse(
      'comtrade-half',
      `"${fileName}" holds the data of a COMTRADE record (.dat) without their configuration, so channels and scaling are unknown.`,
      looksBinary(text) ? CURE : `${CURE} To read it as a plain table, give the sample rate.`,
    );
  }
}
