/** Shown where a figure does not apply. */
export const none = '–';

/** No-break space between number and unit (SI brochure, 9th ed., 5.4.3). */
const gap = '\u00a0';
/** Narrow no-break space between groups of three digits (SI brochure, 5.4.4; ISO 80000-1, 7.3.1). */
const groupGap = '\u202f';
const minus = '\u2212';

export type Figure = number | null | undefined;
export const absent = (value: Figure): value is null | undefined =>
  value === null || value === undefined || !Number.isFinite(value);

const prefixes = [
  { exponent: 9, sign: 'G' },
  { exponent: 6, sign: 'M' },
  { exponent: 3, sign: 'k' },
  { exponent: 0, sign: '' },
  { exponent: -3, sign: 'm' },
  { exponent: -6, sign: 'µ' },
  { exponent: -9, sign: 'n' },
  { exponent: -12, sign: 'p' },
] as const;
const prefixable = new Set([
  'A',
  'V',
  'W',
  'VA',
  'var',
  'Hz',
  's',
  'Pa',
  'm/s²',
  'm/s',
  'm',
  'g',
  'Ω',
  'F',
  'H',
  'N',
  'J',
  'Sa/s',
]);

/** A density per root hertz takes the prefix of its quantity: 130 nV/√Hz. */
const takesPrefix = (unit: string) => prefixable.has(unit.replace(/\/√Hz$/, ''));

/** Power of ten and sign of the prefix that suits `value`; none for units that take no prefix. */
export function prefixOf(value: number, unit: string, digits = 4): { exponent: number; sign: string } {
  return takesPrefix(unit) ? prefixFor(value, digits) : { exponent: 0, sign: '' };
}

/** With a true minus. */
export function signed(text: string): string {
  return text.startsWith('-') ? minus + text.slice(1) : text;
}

function trimZeros(text: string): string {
  return text.includes('.') ? text.replace(/\.?0+$/, '') : text;
}

/** `digits` significant digits without an exponent. */
function toDigits(value: number, digits: number): string {
  if (value === 0) return '0';
  const exponent = Number(value.toExponential(digits - 1).split('e')[1]);
  const decimals = Math.min(100, digits - 1 - exponent);
  if (decimals >= 0) return value.toFixed(decimals);
  const step = 10 ** -decimals;
  return String(Math.round(value / step) * step);
}

/** Prefix that leaves one to three digits before the point once rounded to `digits`. */
function prefixFor(value: number, digits: number) {
  const exponent = value === 0 ? 0 : Number(value.toExponential(digits - 1).split('e')[1]);
  const last = { exponent: -12, sign: 'p' } as const;
  return prefixes.find((prefix) => exponent >= prefix.exponent) ?? last;
}

export interface SiOptions {
  /** Significant digits, 4 when absent. */
  digits?: number;
  /** Leaves out zeros at the end: 50 kHz instead of 50.00 kHz. */
  trim?: boolean;
}

/**
 * A quantity with SI prefix: 2.644 A, 396.7 mA, 50.00 kHz. Units that take no prefix (%, °, dB, and those
 * that carry one, such as mV) are shown as they are.
 */
export function formatSi(value: Figure, unit: string, { digits = 4, trim = false }: SiOptions = {}): string {
  if (absent(value)) return none;
  const prefix = prefixOf(value, unit, digits);
  // Dividing by a whole power keeps the decimal that was meant (0.001 is not exact in binary).
  const scaled = prefix.exponent < 0 ? value * 10 ** -prefix.exponent : value / 10 ** prefix.exponent;
  const text = toDigits(scaled, digits);
  const number = signed(trim ? trimZeros(text) : text);
  return unit ? `${number}${gap}${prefix.sign}${unit}` : number;
}

/** A number with fixed decimals and its unit, without prefix: −128.1°, 49.981 Hz. */
export function formatFixed(value: Figure, decimals: number, unit = ''): string {
  if (absent(value)) return none;
  const number = signed(value.toFixed(decimals)).replace(/^−(0(\.0*)?)$/, '$1');
  if (!unit) return number;
  return unit === '°' ? `${number}°` : `${number}${gap}${unit}`;
}

/** 53.7 % */
export function formatPercent(value: Figure, decimals = 1): string {
  return formatFixed(value, decimals, '%');
}

/** −60.2 dB */
export function formatDb(value: Figure, decimals = 1): string {
  return formatFixed(value, decimals, 'dB');
}

/** A frequency with its digits and no prefix: 49.981 Hz. Use `formatSi` for sample rates. */
export function formatHz(value: Figure, decimals = 3): string {
  return formatFixed(value, decimals, 'Hz');
}

/** A whole number in groups of three from 10 000 on: 1500, 1 500 000. */
export function formatCount(value: Figure): string {
  if (absent(value)) return none;
  const text = signed(String(Math.round(value)));
  return text.length > 4 ? text.replace(/\B(?=(\d{3})+$)/g, groupGap) : text;
}

/** A duration: 80.0 ms, 30.0 s, 12 min 05 s, 2 h 05 min. */
export function formatDuration(valueS: Figure): string {
  if (absent(valueS)) return none;
  if (Math.abs(valueS) < 59.95) return formatSi(valueS, 's', { digits: 3 });
  const total = Math.round(valueS);
  const two = (part: number) => String(part).padStart(2, '0');
  if (total < 3600) return `${Math.floor(total / 60)}${gap}min ${two(total % 60)}${gap}s`;
  return `${Math.floor(total / 3600)}${gap}h ${two(Math.floor((total % 3600) / 60))}${gap}min`;
}

/** A file size in decimal units (IEC 80000-13): 96.0 MB. */
export function formatBytes(bytes: Figure): string {
  if (absent(bytes)) return none;
  if (bytes < 1000) return `${bytes}${gap}B`;
  const prefix = prefixFor(bytes, 3);
  return `${toDigits(bytes / 10 ** prefix.exponent, 3)}${gap}${prefix.sign}B`;
}

/** Short form of a SHA-256 for reading: 9f3c 1ad0 … 77e2. */
export function formatSha256(sha256: string): string {
  return `${sha256.slice(0, 4)} ${sha256.slice(4, 8)} … ${sha256.slice(-4)}`;
}
