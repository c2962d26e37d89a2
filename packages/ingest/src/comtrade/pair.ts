import { refuse } from '../refusal.js';

/** Half of a COMTRADE record of two files: the configuration, of which `head` is the whole or the beginning. */
export interface ConfigurationFile {
  name: string;
  head: Uint8Array;
}

/** The other half: the data, which are not looked at. */
export interface DataFile {
  name: string;
  sizeBytes: number;
}

/** What makes one file of two: `beforeCfg` + the .cfg + `beforeDat` + the .dat, byte for byte. */
export interface JoinedPair {
  fileName: string;
  beforeCfg: Uint8Array;
  beforeDat: Uint8Array;
}

const TYPES = ['ASCII', 'BINARY', 'BINARY32', 'FLOAT32'];

/** The type of the data stands alone on its line; the last such line counts, since the station may be named likewise. */
function dataType(text: string): string | undefined {
  const words = text
    .replace('\u001a', '')
    .split(/[\r\n]+/)
    .map((line) => (line.split(',')[0] ?? '').trim().toUpperCase());
  return words.findLast((word) => TYPES.includes(word));
}

/**
 * Joins the two files of a COMTRADE record into the single-file form (.cff) of IEEE C37.111-2013, which is
 * IEC 60255-24:2013. Configurations of the 1991 and 1999 revisions stay as they are and are read as such.
 * @throws Refusal (an Error whose `problem` has code, message and cure) where `head` does not reach to the line that
 *   names the type of the data, or holds no configuration
 */
export function joinComtradePair(cfg: ConfigurationFile, dat: DataFile): JoinedPair {
  const text = new TextDecoder('latin1').decode(cfg.head);
  const type = dataType(text);
  if (type === undefined) {
    refuse(
      'no-data-type',
      `"${cfg.name}" names no type of data (${TYPES.join(', ')}), so "${dat.name}" cannot be read with it.`,
      'Choose the .cfg that belongs to the .dat, as the recorder wrote both.',
    );
  }
  if (!Number.isSafeInteger(dat.sizeBytes) || dat.sizeBytes < 1) {
    refuse(
      'no-samples',
      `"${dat.name}" is empty: there are no samples in it.`,
      'Copy the .dat from the recorder again.',
    );
  }
  const end = text.includes('\r\n') || !text.includes('\n') ? '\r\n' : '\n';
  const size = type === 'ASCII' ? '' : `: ${dat.sizeBytes}`;
  const bytes = (line: string) => new TextEncoder().encode(line);
  return {
    fileName: `${cfg.name.replace(/\.cfg$/i, '')}.cff`,
    beforeCfg: bytes(`--- file type: CFG ---${end}`),
    // The configuration may lack the end of its last line; a blank line more is nothing.
    beforeDat: bytes(`${end}--- file type: DAT ${type}${size} ---${end}`),
  };
}
