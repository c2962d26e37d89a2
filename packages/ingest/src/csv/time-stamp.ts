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
const YEAR_LAST = new RegExp(String.raw`^(\d{1,2})([./])(\d{1,2})\2(\d{4})[T\s]+${CLOCK}$`, 'i');
const CLOCK_ONLY = new RegExp(String.raw`^${CLOCK}$`, 'i');

function clockSeconds(parts: (string | undefined)[]): number {
  const [hours = '0', minutes = '0', seconds = '0', , half] = parts;
  const hour =
    half === undefined ? Number(hours) : (Number(hours) % 12) + (half.toLowerCase() === 'pm' ? 12 : 0);
  return hour * 3600 + Number(minutes) * 60 + Number(seconds);
}

/** Midnight of the day in seconds since 1970, and the parts of the clock; slashes with a possible month: month first. */
function splitDay(text: string): { seconds: number; clock: (string | undefined)[] } | null {
  const yearFirst = YEAR_FIRST.exec(text);
  if (yearFirst !== null) {
    const [, year, month, day] = yearFirst.map(Number) as [number, number, number, number];
    return { seconds: Date.UTC(year, month - 1, day) / 1000, clock: yearFirst.slice(4) };
  }
  const yearLast = YEAR_LAST.exec(text);
  if (yearLast === null) return null;
  const [, first, , second, year] = yearLast.map(Number) as [number, number, number, number, number];
  const [month, day] = yearLast[2] === '/' && first <= 12 ? [first, second] : [second, first];
  return { seconds: Date.UTC(year, month - 1, day) / 1000, clock: yearLast.slice(5) };
}

/**
 * Reads `2024-03-21 10:00:00.25`, `2024-03-21T10:00:00Z`, `21.03.2024 10:00:00,25`, `03/21/2024 10:00:00 AM` or
 * `10:00:00.25`. Zone marks are ignored: only differences between the stamps of one file are used.
 * @returns null for anything else
 */
export function parseStamp(text: string): Stamp | null {
  const day = splitDay(text);
  const clock = day?.clock ?? CLOCK_ONLY.exec(text)?.slice(1);
  if (clock === undefined) return null;
  return {
    wholeSeconds: (day?.seconds ?? 0) + clockSeconds(clock),
    fraction: Number(`0.${clock[3] ?? '0'}`),
  };
}
