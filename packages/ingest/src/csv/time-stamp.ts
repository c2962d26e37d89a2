/** A calendar or clock stamp: whole seconds since 1970 (or since midnight) and the fraction, kept apart for precision. */
export interface Stamp {
  wholeSeconds: number;
  fraction: number;
}

const CLOCK = String.raw`(\d{1,2}):(\d{2})(?::(\d{2})(?:[.,:](\d{1,9}))?)?\s*(am|pm)?`;
const YEAR_FIRST = new RegExp(
  String.raw`^(\d{4})[-/.](\d{1,2})[-/.](\d{1,2})[T\s]+${CLOCK}\s*(?:Z|UTC|[+-]\d{2}:?\d{2})?$`,
  'i',
);
const DAY_FIRST = new RegExp(String.raw`^(\d{1,2})\.(\d{1,2})\.(\d{4})[T\s]+${CLOCK}$`, 'i');
const CLOCK_ONLY = new RegExp(String.raw`^${CLOCK}$`, 'i');

function clockSeconds(parts: (string | undefined)[]): number {
  const [hours = '0', minutes = '0', seconds = '0', , half] = parts;
  const hour =
    half === undefined ? Number(hours) : (Number(hours) % 12) + (half.toLowerCase() === 'pm' ? 12 : 0);
  return hour * 3600 + Number(minutes) * 60 + Number(seconds);
}

/**
 * Reads `2024-03-21 10:00:00.25`, `2024-03-21T10:00:00Z`, `21.03.2024 10:00:00,25` or `10:00:00.25`. Zone marks are
 * ignored: only differences between the stamps of one file are used.
 * @returns null for anything else, dates written month first among it
 */
export function parseStamp(text: string): Stamp | null {
  const yearFirst = YEAR_FIRST.exec(text);
  const match = yearFirst ?? DAY_FIRST.exec(text);
  const clock = match === null ? CLOCK_ONLY.exec(text)?.slice(1) : match.slice(4);
  if (clock === undefined) return null;
  let wholeSeconds = clockSeconds(clock);
  if (match !== null) {
    const [first, month, last] = [Number(match[1]), Number(match[2]), Number(match[3])];
    const [year, day] = yearFirst === null ? [last, first] : [first, last];
    wholeSeconds += Date.UTC(year, month - 1, day) / 1000;
  }
  return { wholeSeconds, fraction: Number(`0.${clock[3] ?? '0'}`) };
}
