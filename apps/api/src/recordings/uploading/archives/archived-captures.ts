import { joinComtradePair } from '@overtally/ingest';
import { posix } from 'node:path';
import { buffer } from 'node:stream/consumers';
import type { ZipFile } from 'yauzl';
import { bytesInWords } from '../bytes-in-words.js';
import { maxConfigurationBytes } from './archive-bounds.js';
import type { LeftOut, Member } from './archive-members.js';
import { inflated, type UnpackBudget } from './inflate-member.js';
import { MemberRefused } from './member-refused.js';

/** A file of an archive, or two that are one COMTRADE record: its configuration, then its data. */
export interface ArchivedCapture {
  /** Tells it from the other captures of the archive. */
  path: string;
  members: readonly [Member] | readonly [Member, Member];
}

/** A capture as it goes into storage. */
export interface UnpackedCapture {
  fileName: string;
  bytes: AsyncGenerator<Uint8Array>;
}

const comtradeFile = /\.(cfg|dat|hdr|inf)$/i;

/** Puts the files of an archive together to captures. COMTRADE files belong together by folder and name without extension. */
export function capturesOf(members: readonly Member[]): { captures: ArchivedCapture[]; leftOut: LeftOut[] } {
  const records = new Map<string, Map<string, Member>>();
  for (const member of members) {
    const extension = comtradeFile.exec(member.path)?.[1]?.toLowerCase();
    if (extension === undefined) continue;
    const files = records.get(recordName(member)) ?? new Map<string, Member>();
    if (!files.has(extension)) records.set(recordName(member), files.set(extension, member));
  }
  const captures: ArchivedCapture[] = [];
  const leftOut: LeftOut[] = [];
  for (const member of members) {
    const { path } = member;
    const files = comtradeFile.test(path) ? records.get(recordName(member)) : undefined;
    const [cfg, dat] = [files?.get('cfg'), files?.get('dat')];
    if (cfg !== undefined && dat !== undefined) {
      if (member === cfg) captures.push({ path, members: [cfg, dat] });
      else if (member !== dat)
        leftOut.push({ path, reason: `It belongs to ${cfg.path}, which is read without it` });
    } else if (member === cfg) {
      leftOut.push({ path, reason: 'It describes a COMTRADE record whose .dat is not beside it. Pack both' });
    } else captures.push({ path, members: [member] });
  }
  return { captures, leftOut };
}

/** Bytes that a capture has when it is unpacked, as the archive tells. */
export function toldBytes({ members }: ArchivedCapture): number {
  return members.reduce((sum, { entry }) => sum + entry.uncompressedSize, 0);
}

/**
 * Unpacks a capture; two files of a COMTRADE record become one.
 * @throws MemberRefused now or while the bytes are taken
 */
export async function unpacked(
  zip: ZipFile,
  { members: [first, data] }: ArchivedCapture,
  budget: UnpackBudget,
  signal: AbortSignal,
): Promise<UnpackedCapture> {
  if (data === undefined) {
    return { fileName: posix.basename(first.path), bytes: inflated(zip, first, budget, signal) };
  }
  const size = first.entry.uncompressedSize;
  if (size > maxConfigurationBytes) {
    const most = bytesInWords(maxConfigurationBytes);
    throw new MemberRefused(
      `A COMTRADE configuration of ${bytesInWords(size)} is not taken; ${most} are the most`,
    );
  }
  const configuration = await buffer(inflated(zip, first, budget, signal));
  const { fileName, beforeCfg, beforeDat } = joined(first, configuration, data);
  async function* bytes() {
    yield beforeCfg;
    yield configuration;
    yield beforeDat;
    yield* inflated(zip, data!, budget, signal);
  }
  return { fileName, bytes: bytes() };
}

function joined(configuration: Member, head: Uint8Array, data: Member) {
  try {
    return joinComtradePair(
      { name: posix.basename(configuration.path), head },
      { name: posix.basename(data.path), sizeBytes: data.entry.uncompressedSize },
    );
  } catch (error) {
    if (!(error instanceof Error && 'problem' in error)) throw error;
    const { message, cure } = error.problem as { message: string; cure: string };
    throw new MemberRefused(`${message} ${cure}`);
  }
}

function recordName({ path }: Member): string {
  return path.replace(comtradeFile, '').toLowerCase();
}
