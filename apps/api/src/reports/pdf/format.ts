const gap = '\u00a0';
const absent = '–';
const prefixes = [
  { symbol: 'p', factor: 1e-12 },
  { symbol: 'n', factor: 1e-9 },
  { symbol: 'µ', factor: 1e-6 },
  { symbol: 'm', factor: 1e-3 },
  { symbol: '', factor: 1 },
  { symbol: 'k', factor: 1e3 },
  { symbol: 'M', factor: 1e6 },
  { symbol: 'G', factor: 1e9 },
];
const unprefixed = 4;

/** Units that may carry an SI prefix; any other unit is printed as it stands. */
const prefixable = new Set([
  'A',
  'V',
  'W',
  'VA',
  'var',
  'Hz',
  's',
  'Pa',
  'm/s',
  'm/s²',
  'm/s^2',
  'Ω',
  'F',
  'H',
  'N',
  'm',
]);

const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];

const withMinus = (text: string): string => text.replace(/^-/, '−');

/** Groups the digits before the decimal point by threes, as ISO 80000-1, 7.3.1 writes them. */
const grouped = (digits: string): string => digits.replace(/\B(?=(\d{3})+(?!\d))/g, gap);

/** A number to `digits` significant digits without exponent, trailing zeros kept. */
function significant(value: number, digits: number): string {
  const text = value.toPrecision(digits);
  return withMinus(text.includes('e') ? Number(text).toFixed(0) : text);
}

/**
 * A value with its unit and SI prefix, four significant digits: 0.17 A gives "170.0 mA".
 *
 * @param value in `unit`; null or undefined (does not apply) gives an en dash
 * @param unit a unit that takes no prefix ("%", "dB", "mV") is printed unchanged
 */
export function formatQuantity(value: number | null | undefined, unit: string, digits = 4): string {
  if (value === null || value === undefined) return absent;
  if (value === 0) return `0${gap}${unit}`.trimEnd();
  if (!prefixable.has(unit)) return `${plain(value, digits)}${gap}${unit}`.trimEnd();
  const { symbol, factor } = prefixFor(value, digits);
  return `${significant(value / factor, digits)}${gap}${symbol}${unit}`;
}

/** Label of an axis tick: "100 mA", "2.5 V". */
export const formatTick = (value: number, unit: string): string =>
  formatQuantity(value, unit, 3)
    .replace(/(\.\d*?)0+(?=\D|$)/, '$1')
    .replace(/\.(?=\D|$)/, '');

function prefixFor(value: number, digits: number): { symbol: string; factor: number } {
  const rounded = Math.abs(Number(value.toPrecision(digits)));
  const place = unprefixed + Math.floor(Math.log10(rounded) / 3 + 1e-12);
  return prefixes[Math.min(Math.max(place, 0), prefixes.length - 1)]!;
}

function plain(value: number, digits: number): string {
  const size = Math.abs(value);
  return size >= 1e-4 && size < 1e6 ? significant(value, digits) : withMinus(value.toExponential(digits - 1));
}

/** A percentage with fixed decimals; a value too small for them is said to be below the last place. */
export function formatPercent(value: number | null | undefined, decimals = 2): string {
  if (value === null || value === undefined) return absent;
  const last = 10 ** -decimals;
  if (value !== 0 && Math.abs(value) < last / 2) return `<${gap}${last.toFixed(decimals)}${gap}%`;
  return `${withMinus(value.toFixed(decimals))}${gap}%`;
}

/** A share of a limit with one decimal, and as many more as it takes to tell it from 100 %. */
export function formatShare(value: number | null | undefined): string {
  if (value === null || value === undefined) return absent;
  let decimals = 1;
  while (decimals < 6 && value !== 100 && Number(value.toFixed(decimals)) === 100) decimals += 1;
  return formatPercent(value, decimals);
}

/** A plain figure such as a crest factor, four significant digits. */
export const formatFigure = (value: number | null | undefined, digits = 4): string =>
  value === null || value === undefined ? absent : value === 0 ? '0' : plain(value, digits);

/** A number that a person or a file gave, as it was given. */
export const formatGiven = (value: number): string => withMinus(String(value));

/** A whole number with grouped digits. */
export const formatCount = (value: number | null | undefined): string =>
  value === null || value === undefined ? absent : grouped(String(value));

/** A moment in UTC: "26 Nov 2026, 14:20 UTC". */
export function formatMoment(iso: string | null): string {
  if (iso === null) return absent;
  const at = new Date(iso);
  const two = (value: number): string => String(value).padStart(2, '0');
  return `${formatDate(iso)}, ${two(at.getUTCHours())}:${two(at.getUTCMinutes())} UTC`;
}

/** The day of a moment in UTC: "26 Nov 2026". */
export function formatDate(iso: string | null): string {
  if (iso === null) return absent;
  const at = new Date(iso);
  return `${at.getUTCDate()} ${months[at.getUTCMonth()]} ${at.getUTCFullYear()}`;
}

/** "2, 3 and 5", and "2, 3, 5 and 7 more" past `atMost`. */
export function formatList(items: readonly (string | number)[], atMost = Infinity): string {
  if (items.length > atMost) return `${items.slice(0, atMost).join(', ')} and ${items.length - atMost} more`;
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} and ${items[items.length - 1]}`;
}

/** a, b … z, aa, ab …: how notes are lettered. */
export function noteLetter(index: number): string {
  const letter = String.fromCharCode(97 + (index % 26));
  return index < 26 ? letter : noteLetter(Math.floor(index / 26) - 1) + letter;
}

/** A day of the calendar, YYYY-MM-DD, as "3 Feb 2026". */
export const formatDay = (day: string): string => formatDate(`${day}T00:00:00Z`);
