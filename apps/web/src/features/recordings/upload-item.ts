import type { FinishUpload, UploadOutcome } from '@overtally/contracts';

/** A file that came by drop or choice. */
export interface IncomingFile {
  file: File;
  /** Where it lies in the folder that was dropped, its name included; the name alone without a folder. */
  path: string;
  /** What it was put together from, for a pair of files sent as one. */
  madeOf?: readonly string[];
  /** Why it is not to be sent, where that showed itself before it was on the list. */
  reason?: string | null;
}

/** The options that a file is to be read by, the rule they come from, and what is said of the capture. */
export type Reading = Pick<
  FinishUpload,
  'import' | 'readingRuleId' | 'equipmentId' | 'operatingModeId' | 'measuringChainId' | 'conditions'
>;

/**
 * - `looking`, `asking`: its layout is looked into; the form asks how it is to be read
 * - `sending`, `interrupted` (trying again by itself), `paused`, `finishing` (arrived whole, the server makes
 *   recordings of it)
 * - `failed`, `stopped`: ended without a recording, may be sent again
 * - `left-out`: looked into and not sent
 */
export type UploadState =
  | 'looking'
  | 'asking'
  | 'waiting'
  | 'sending'
  | 'interrupted'
  | 'paused'
  | 'finishing'
  | 'done'
  | 'failed'
  | 'stopped'
  | 'left-out';

export interface UploadItem extends IncomingFile {
  id: number;
  /** How it is to be read; empty leaves it to the server and its reading rules. */
  reading: Reading;
  state: UploadState;
  sentBytes: number;
  /** B/s over the last seconds; null where nothing can be said. */
  speed: number | null;
  /** Where the upload goes on; null before the server has it and once it is dropped. */
  url: string | null;
  /** SHA-256 of the file here, once it is known. */
  sha256: string | null;
  outcome: UploadOutcome | null;
  /** Why it failed, is interrupted, or could not be dropped. */
  error: unknown;
  /** Why it was left out, where the product decided so. */
  reason: string | null;
}

const open: readonly UploadState[] = [
  'looking',
  'asking',
  'waiting',
  'sending',
  'interrupted',
  'paused',
  'finishing',
];

/** True while an upload has not ended. */
export const isOpen = ({ state }: UploadItem): boolean => open.includes(state);

/** True where it takes one of the places for uploads that run at the same time. */
export const isRunning = ({ state }: UploadItem): boolean =>
  state === 'sending' || state === 'interrupted' || state === 'finishing';

/** True where it was broken off by somebody or something and may go on. */
export const mayResume = ({ state }: UploadItem): boolean =>
  state === 'paused' || state === 'failed' || state === 'stopped';

export const mayPause = ({ state }: UploadItem): boolean =>
  state === 'waiting' || state === 'sending' || state === 'interrupted';

/** True while it is not settled how it is read. */
export const isUndecided = ({ state }: UploadItem): boolean => state === 'looking' || state === 'asking';

/** What the server makes of a file once it has arrived cannot be stopped halfway. */
export const mayStop = (item: UploadItem): boolean => isOpen(item) && item.state !== 'finishing';
