import { formatBytes, formatDuration, formatFixed, formatPercent } from '../../../lib/format.js';
import { isOpen, type UploadItem } from '../upload-item.js';

/** Share of its bytes that have been sent, 0 to 1. */
export const shareOf = ({ sentBytes, file }: UploadItem): number =>
  file.size > 0 ? Math.min(1, sentBytes / file.size) : 0;

/** Whole percent, rounded down: 100 % only when all has arrived. */
export const percentOf = (share: number): string => formatPercent(Math.floor(100 * share), 0);

/** "12 s left", "3 min left"; empty where nothing can be said. */
export function remainingWords(bytesLeft: number, speed: number | null): string {
  if (!speed || bytesLeft <= 0) return '';
  const seconds = Math.ceil(bytesLeft / speed);
  if (seconds < 60) return `${formatFixed(seconds, 0, 's')} left`;
  if (seconds < 3600) return `${formatFixed(Math.ceil(seconds / 60), 0, 'min')} left`;
  return `${formatDuration(seconds)} left`;
}

/** "61 %, 41.8 MB of 68.0 MB, 5.20 MB/s, 5 s left" */
export function progressWords(sentBytes: number, totalBytes: number, speed: number | null): string {
  const share = totalBytes > 0 ? Math.min(1, sentBytes / totalBytes) : 0;
  return [
    percentOf(share),
    `${formatBytes(sentBytes)} of ${formatBytes(totalBytes)}`,
    speed ? `${formatBytes(Math.round(speed))}/s` : '',
    remainingWords(totalBytes - sentBytes, speed),
  ]
    .filter(Boolean)
    .join(', ');
}

/** Bytes and speed of all that is under way or has arrived. */
export function totalsOf(items: readonly UploadItem[]) {
  const counted = items.filter((item) => isOpen(item) || item.state === 'done');
  const speeds = counted.flatMap(({ speed }) => speed ?? []);
  return {
    sentBytes: counted.reduce((sum, item) => sum + item.sentBytes, 0),
    totalBytes: counted.reduce((sum, item) => sum + item.file.size, 0),
    speed: speeds.length > 0 ? speeds.reduce((sum, speed) => sum + speed, 0) : null,
  };
}

/** "2 uploading, 1 paused, 3 of 6 received" */
export function countWords(items: readonly UploadItem[]): string {
  const count = (...states: UploadItem['state'][]) =>
    items.filter(({ state }) => states.includes(state)).length;
  const parts = [
    [count('sending', 'interrupted', 'finishing'), 'uploading'],
    [count('waiting'), 'waiting'],
    [count('looking'), 'being looked into'],
    [count('asking'), 'to be decided'],
    [count('paused'), 'paused'],
  ] as const;
  const received = `${count('done')} of ${items.length} received`;
  const failed = count('failed');
  return [
    ...parts.filter(([number]) => number > 0).map(([number, word]) => `${number} ${word}`),
    received,
    ...(failed > 0 ? [`${failed} not received`] : []),
  ].join(', ');
}

/** What a screen reader is told: the counts, and the share of all in steps of ten percent. */
export function spokenStatus(items: readonly UploadItem[]): string {
  const interrupted = items.some(({ state }) => state === 'interrupted');
  const { sentBytes, totalBytes } = totalsOf(items);
  const tens = totalBytes > 0 ? 10 * Math.floor((10 * sentBytes) / totalBytes) : 0;
  const progress = items.some(isOpen) ? `, ${tens} percent` : '';
  return `Uploads: ${countWords(items)}${progress}${interrupted ? ', connection lost, trying again' : ''}`;
}
