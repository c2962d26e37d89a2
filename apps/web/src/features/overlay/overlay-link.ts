import type { Scale } from '../../components/charts/amplitude-axis.js';

/** Channels that one overlay holds; there are as many styles. */
export const overlayCapacity = 12;

/** One channel of an overlay as the address names it. */
export interface OverlayEntry {
  recordingId: string;
  /** Null: the channel that the recording begins with. */
  channel: number | null;
  /** Style that it keeps when others come and go, from 0. */
  style: number;
}

export interface OverlayView {
  by: 'order' | 'frequency';
  scale: Scale;
  amplitude: 'absolute' | 'relative';
  orders: 'all' | 'odd';
  limitSetId: string | null;
}

const uuid = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i;

interface NamedEntry {
  recordingId: string;
  channel: number | null;
  style: number | null;
}

function readEntry(text: string): NamedEntry | null {
  const [recordingId = '', channel = '', style = ''] = text.split(':');
  if (!uuid.test(recordingId)) return null;
  const whole = (part: string) => (/^\d{1,4}$/.test(part) ? Number(part) : null);
  return { recordingId, channel: whole(channel), style: whole(style) };
}

/** Keeps styles that are asked for and free; the others get the lowest free ones. */
function withStyles(entries: readonly NamedEntry[]): OverlayEntry[] {
  const taken = new Set<number>();
  const kept = entries.map(({ style }) => {
    if (style === null || style >= overlayCapacity || taken.has(style)) return null;
    taken.add(style);
    return style;
  });
  return entries.map(({ recordingId, channel }, index) => {
    const style = kept[index] ?? lowestFree(taken);
    taken.add(style);
    return { recordingId, channel, style };
  });
}

function lowestFree(taken: ReadonlySet<number>): number {
  let style = 0;
  while (taken.has(style)) style += 1;
  return style;
}

export interface ReadEntries {
  entries: OverlayEntry[];
  /** Channels of the address beyond what an overlay holds. */
  leftOut: number;
}

/**
 * Channels of `?r=recordingId:channel:style,…`; channel and style may be absent. Parts that name no recording
 * and repetitions are dropped.
 */
export function readEntries(text: string | null): ReadEntries {
  const named = new Map<string, NamedEntry>();
  for (const part of (text ?? '').split(',')) {
    const entry = readEntry(part);
    if (entry) named.set(entryKey(entry), named.get(entryKey(entry)) ?? entry);
  }
  const all = [...named.values()];
  return {
    entries: withStyles(all.slice(0, overlayCapacity)),
    leftOut: Math.max(0, all.length - overlayCapacity),
  };
}

/** The address form of entries; styles are written only where they are not those of the places. */
export function writeEntries(entries: readonly OverlayEntry[]): string {
  const plain = entries.every(({ style }, index) => style === index);
  return entries
    .map(({ recordingId, channel, style }) => {
      const parts = plain ? [recordingId, channel] : [recordingId, channel ?? '', style];
      return parts.filter((part) => part !== null).join(':');
    })
    .join(',');
}

export const entryKey = ({ recordingId, channel }: Pick<OverlayEntry, 'recordingId' | 'channel'>): string =>
  `${recordingId}:${channel ?? ''}`;

/** Entries with more channels, each in the lowest free style; what is there already is not added twice. */
export function addChannels(
  entries: readonly OverlayEntry[],
  added: readonly { recordingId: string; channel: number }[],
): OverlayEntry[] {
  const known = new Set(entries.map(entryKey));
  const fresh = added.filter((entry) => !known.has(entryKey(entry)));
  return withStyles([...entries, ...fresh.map((entry) => ({ ...entry, style: null }))]);
}

/** Moves one entry by one place. */
export function moveEntry(entries: readonly OverlayEntry[], index: number, by: -1 | 1): OverlayEntry[] {
  const moved = [...entries];
  const [entry] = moved.splice(index, 1);
  if (entry) moved.splice(index + by, 0, entry);
  return moved;
}

const oneOf = <T extends string>(value: string | null, options: readonly [T, ...T[]]): T =>
  options.find((option) => option === value) ?? options[0];

/** What the address says of the view; the first of each choice where it says nothing. */
export function readView(search: URLSearchParams): OverlayView {
  return {
    by: oneOf(search.get('by'), ['order', 'frequency']),
    scale: oneOf(search.get('scale'), ['log', 'linear']),
    amplitude: oneOf(search.get('as'), ['absolute', 'relative']),
    orders: oneOf(search.get('orders'), ['all', 'odd']),
    limitSetId: search.get('limits'),
  };
}
