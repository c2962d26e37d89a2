import { readFileSync } from 'node:fs';

const ROOT = new URL('../../../fixtures/reference/', import.meta.url);

export interface Expected {
  kind:
    | 'number'
    | 'angle'
    | 'array'
    | 'angles'
    | 'integer'
    | 'text'
    | 'bool'
    | 'one_of'
    | 'poles'
    | 'flags'
    | 'mention';
  value?: number | string | boolean | Nested | ComplexPair[];
  values?: unknown[];
  tol_abs?: number;
  tol_rel?: number;
  tol_abs_each?: number[];
  must?: (string | string[])[];
  must_not?: string[];
  groups?: string[][];
  need?: string;
}
export type Nested = (number | null)[];
/** [real part, imaginary part] */
export type ComplexPair = [number, number];

export interface ReferenceFile {
  name: string;
  format: 'csv' | 'wav';
  sample_rate_hz: number;
  channels: { name: string; unit: string; scale: number; offset_code?: number }[];
}

export interface ReferenceCase {
  id: string;
  family: number;
  title: string;
  files: ReferenceFile[];
  analysis: Record<string, unknown>;
  /** Families 7 and 8: the input of a case without a record. */
  generator?: Record<string, unknown>;
  expected: Record<string, Expected>;
}

/** The cases of one family; what they are and how they were made stands in fixtures/reference/SOURCE.md. */
export function referenceCases(family: number): ReferenceCase[] {
  const text = readFileSync(new URL('cases.json', ROOT), 'utf8');
  const { cases } = JSON.parse(text) as { cases: ReferenceCase[] };
  return cases.filter((c) => c.family === family);
}

export interface ReferenceRecord {
  sampleRateHz: number;
  samples: Float64Array;
  unit: string;
  lowestCode?: number;
  highestCode?: number;
}

/** First channel of the first file of a case, in engineering values. */
export function readRecord({ files }: ReferenceCase): ReferenceRecord {
  const file = files[0]!;
  const bytes = readFileSync(new URL(`records/${file.name}`, ROOT));
  const { scale, unit, offset_code: offset = 0 } = file.channels[0]!;
  const base = { sampleRateHz: file.sample_rate_hz, unit };
  if (file.format === 'csv') {
    return { ...base, samples: lastColumn(bytes.toString('utf8')).map((x) => (x - offset) * scale) };
  }
  const wav = readWav(bytes);
  const ends =
    wav.bits === null ? {} : { lowestCode: -scale, highestCode: scale * (1 - 2 ** (1 - wav.bits)) };
  return { ...base, samples: wav.samples.map((x) => x * scale), ...ends };
}

/** All channels of the CSV record of a case by name, in engineering values. */
export function readChannels({ files }: ReferenceCase): {
  sampleRateHz: number;
  samples: Record<string, Float64Array>;
} {
  const file = files[0]!;
  const text = readFileSync(new URL(`records/${file.name}`, ROOT), 'utf8');
  const [header, ...rows] = text.trim().split(/\r?\n/);
  const cells = rows.map((row) => row.split(','));
  const samples = file.channels.map(({ name, scale }) => {
    const at = header!.split(',').indexOf(name);
    return [name, Float64Array.from(cells, (row) => Number(row[at]) * scale)];
  });
  return {
    sampleRateHz: file.sample_rate_hz,
    samples: Object.fromEntries(samples) as Record<string, Float64Array>,
  };
}

function lastColumn(text: string): Float64Array {
  const rows = text.trim().split(/\r?\n/).slice(1);
  return Float64Array.from(rows, (row) => Number(row.slice(row.lastIndexOf(',') + 1)));
}

/** Mono PCM of 16 or 24 bits and float of 32 or 64 bits: what the reference records use. */
function readWav(bytes: Buffer): { samples: Float64Array; bits: number | null } {
  let format = 0;
  let bits = 0;
  for (let at = 12; at + 8 <= bytes.length;) {
    const id = bytes.toString('latin1', at, at + 4);
    const size = bytes.readUInt32LE(at + 4);
    const body = at + 8;
    if (id === 'fmt ') {
      format = bytes.readUInt16LE(body);
      bits = bytes.readUInt16LE(body + 14);
    }
    if (id === 'data') {
      const width = bits / 8;
      const read =
        format === 3
          ? (p: number) => (width === 8 ? bytes.readDoubleLE(p) : bytes.readFloatLE(p))
          : (p: number) => bytes.readIntLE(p, width) / 2 ** (bits - 1);
      const samples = Float64Array.from({ length: Math.floor(size / width) }, (_, i) =>
        read(body + i * width),
      );
      return { samples, bits: format === 3 ? null : bits };
    }
    at = body + size + (size % 2);
  }
  throw new Error('no data chunk');
}
