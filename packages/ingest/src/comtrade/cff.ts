import { refuse } from '../refusal.js';
import { type ComtradeConfig, parseConfig } from './config.js';
import type { ConfigLine } from './config-line.js';

const LF = 10;
const SECTION = /^\s*---\s*file\s*type\s*:\s*([a-z]+)\s*([a-z\d]*)\s*(?::\s*(\d+)\s*)?---\s*$/i;
const START = /^(\u00ef\u00bb\u00bf)?\s*---\s*file\s*type\s*:/i;
const MAX_HEAD_BYTES = 1 << 24;
const CURE = 'Export the record again as one .cff file with the sections CFG and DAT.';

/** Everything before the data of a single-file COMTRADE record. */
export interface CffHead {
  config: ComtradeConfig;
  /** Free text of the HDR and INF sections, without blank lines. */
  texts: Record<'HDR' | 'INF', string[]>;
  dataOffset: number;
  /** 1-based line on which the data begin. */
  dataLine: number;
  /** Bytes of binary data as stated, null where none are. */
  dataBytes: number | null;
}

/** True for the first section line of a single-file record. */
export function isCff(head: Uint8Array): boolean {
  return START.test(String.fromCharCode(...head.subarray(0, 64)));
}

function decode(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('latin1').decode(bytes);
  }
}

interface Walk {
  section: string;
  config: ConfigLine[];
  texts: CffHead['texts'];
}

function keepLine(walk: Walk, text: string, number: number): void {
  if (walk.section === 'CFG') {
    // A control character marks the end of a file on old systems.
    const fields = text
      .replace('\u001a', '')
      .split(',')
      .map((field) => field.trim());
    if (fields.some((field) => field !== '')) walk.config.push({ fields, number });
  } else if ((walk.section === 'HDR' || walk.section === 'INF') && text.trim() !== '') {
    walk.texts[walk.section].push(text.trim());
  }
}

function atData(walk: Walk, match: RegExpExecArray, line: number, dataOffset: number): CffHead {
  if (walk.config.length === 0) {
    refuse(
      'no-configuration',
      `Line ${line}: the data come before any CFG section, so their layout is unknown.`,
      CURE,
      { line },
    );
  }
  const config = parseConfig(walk.config);
  const isText = (match[2] ?? '').toUpperCase() === 'ASCII';
  if (isText !== (config.encoding === 'ascii')) {
    refuse(
      'data-type-differs',
      `Line ${line}: the section says its data are ${(match[2] ?? '').toUpperCase() || 'of no stated type'}, the configuration says ${config.encoding.toUpperCase()}.`,
      'Make the section line and the type of the data in the configuration agree.',
      { line },
    );
  }
  const stated = match[3] === undefined || isText ? null : Number(match[3]);
  return { config, texts: walk.texts, dataOffset, dataLine: line + 1, dataBytes: stated };
}

/**
 * Walks the sections of a single-file COMTRADE record (.cff, IEEE C37.111-2013, which is IEC 60255-24) up to its data.
 * @param bytes the beginning of the file
 * @param complete whether `bytes` is the whole file
 * @returns what stands before the data, or the count of bytes needed to get further
 */
export function readCffHead(bytes: Uint8Array, complete: boolean): CffHead | number {
  const walk: Walk = { section: '', config: [], texts: { HDR: [], INF: [] } };
  let start = bytes[0] === 0xef ? 3 : 0;
  for (let line = 1; start < bytes.length; line += 1) {
    const end = bytes.indexOf(LF, start);
    if (end < 0 && !complete) break;
    const next = end < 0 ? bytes.length : end + 1;
    const text = decode(bytes.subarray(start, next)).replace(/[\r\n]+$/, '');
    const match = SECTION.exec(text);
    if (match === null) keepLine(walk, text, line);
    else {
      walk.section = (match[1] ?? '').toUpperCase();
      if (walk.section === 'DAT') return atData(walk, match, line, next);
    }
    start = next;
  }
  if (complete) {
    refuse('no-data-section', 'The COMTRADE file has no DAT section: there are no samples in it.', CURE);
  }
  if (bytes.length >= MAX_HEAD_BYTES) {
    refuse('header-too-long', 'The COMTRADE file holds more than 16 MB of text before its data.', CURE);
  }
  return Math.max(1 << 16, 2 * bytes.length);
}
