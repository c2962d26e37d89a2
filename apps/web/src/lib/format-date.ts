import { none } from './format.js';

export interface DateOptions {
  locale?: string;
  timeZone?: string;
}

const styles = {
  date: { day: 'numeric', month: 'short', year: 'numeric' },
  dateTime: { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' },
  full: {
    day: 'numeric',
    month: 'short',
    year: 'numeric',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
    timeZoneName: 'short',
  },
} as const satisfies Record<string, Intl.DateTimeFormatOptions>;

function format(iso: string | null, style: keyof typeof styles, { locale, timeZone }: DateOptions): string {
  if (iso === null) return none;
  return new Intl.DateTimeFormat(locale, { ...styles[style], ...(timeZone ? { timeZone } : {}) }).format(
    new Date(iso),
  );
}

/** Day of a moment in the reader's own form and zone: 26 Nov 2026. */
export function formatDate(iso: string | null, options: DateOptions = {}): string {
  return format(iso, 'date', options);
}

/** Day and time: 26 Nov 2026, 14:20. */
export function formatDateTime(iso: string | null, options: DateOptions = {}): string {
  return format(iso, 'dateTime', options);
}

/** Day and time to the second with the zone, for titles of times. */
export function formatDateTimeFull(iso: string | null, options: DateOptions = {}): string {
  return format(iso, 'full', options);
}
