import { getFileNameLowLevel, openPromise, type Entry, type ZipFile } from 'yauzl';
import { problem } from '../../../common/problem.js';
import { maxMembers } from './archive-bounds.js';

/** A file of an archive that may come in. */
export interface Member {
  /** As it stands in the archive. */
  path: string;
  entry: Entry;
}

export interface LeftOut {
  path: string;
  reason: string;
}

const maxPathLength = 300;
/** Hosts whose external attributes hold a Unix mode (PKWARE APPNOTE, 4.4.2): UNIX, OS X. */
const unixHosts = [3, 19];
const fileTypeMask = 0o170_000;
const regularFile = 0o100_000;
const symbolicLink = 0o120_000;
const methods = { stored: 0, deflated: 8 };
/** A local file header without its name (PKWARE APPNOTE, 4.3.7). */
const localHeaderBytes = 30;
/** What operating systems leave in folders. */
const clutter = /^(__macosx|thumbs\.db|desktop\.ini|\..*)$/i;
/** Part of every Office Open XML document (ECMA-376-2, 10.1.2). */
const officePart = '[Content_Types].xml';

/**
 * Opens an archive.
 * @throws ProblemException 422 `archive-unreadable` where it is no ZIP or not whole
 */
export async function openArchive(path: string): Promise<ZipFile> {
  try {
    // Names are decoded below: one that is unfit must not end the list.
    return await openPromise(path, { autoClose: false, decodeStrings: false });
  } catch (error) {
    throw unreadable(error);
  }
}

/**
 * Reads the central directory of an archive and tells what may come in. Folders and clutter of operating systems go
 * without a word.
 * @throws ProblemException 422 for an archive that cannot be read, has too many files, or is a document
 */
export async function readMembers(zip: ZipFile): Promise<{ members: Member[]; leftOut: LeftOut[] }> {
  if (zip.entryCount > maxMembers) {
    const detail = `The archive holds ${zip.entryCount} entries; at most ${maxMembers} are taken at once. Divide it`;
    throw problem(422, 'archive-too-many', detail);
  }
  const directoryOffset = zip.readEntryCursor as unknown as number;
  const found = await allMembers(zip);
  if (found.some(({ path }) => path === officePart)) {
    const detail =
      'The file is a spreadsheet or another office document. Save the sheet as CSV and send that';
    throw problem(422, 'not-a-capture', detail);
  }
  const overlapping = overlappingMembers(found, directoryOffset);
  const seen = new Set<string>();
  const members: Member[] = [];
  const leftOut: LeftOut[] = [];
  for (const member of found) {
    if (isNoFile(member.path)) continue;
    const reason =
      fault(member) ??
      (overlapping.has(member) ? 'Its bytes overlap those of another entry of the archive' : undefined) ??
      (seen.has(member.path)
        ? 'The same path stands in the archive before; the first file was taken'
        : undefined);
    seen.add(member.path);
    if (reason === undefined) members.push(member);
    else leftOut.push({ path: member.path, reason });
  }
  return { members, leftOut };
}

/** A path as it may be shown: without control characters, and not endless. */
export function shownPath(path: string): string {
  return path.replace(/[\p{Cc}\p{Cs}]/gu, '�').slice(0, maxPathLength);
}

async function allMembers(zip: ZipFile): Promise<Member[]> {
  const found: Member[] = [];
  try {
    for await (const entry of zip.eachEntry()) {
      const name = getFileNameLowLevel(
        entry.generalPurposeBitFlag,
        entry.fileNameRaw,
        entry.extraFields,
        true,
      );
      found.push({ path: name, entry });
    }
  } catch (error) {
    throw unreadable(error);
  }
  return found;
}

function isNoFile(path: string): boolean {
  if (path.endsWith('/')) return true;
  const folders = path.split('/');
  const isSound = !path.includes('\\') && !folders.includes('..');
  return isSound && folders.some((name) => name !== '.' && clutter.test(name));
}

/** Why an entry may not come in, by what the directory tells of it. */
function fault({ path, entry }: Member): string | undefined {
  if (path.includes('\\'))
    return 'Its path holds a backslash; ZIP separates folders by slashes. Pack it anew';
  if (path.startsWith('/') || /^[a-z]:/i.test(path))
    return 'Its path is absolute. Pack it from within its folder';
  if (path.split('/').includes('..'))
    return 'Its path leads out of the archive (..). Pack it from within its folder';
  if (path === '' || /\p{Cc}/u.test(path)) return 'Its path holds characters that are no text';
  const type = unixHosts.includes(entry.versionMadeBy >>> 8)
    ? (entry.externalFileAttributes >>> 16) & fileTypeMask
    : 0;
  if (type === symbolicLink) return 'It is a link. Pack the file that it leads to';
  if (type !== 0 && type !== regularFile) return 'It is no ordinary file';
  if (entry.isEncrypted()) return 'It is encrypted. Pack it without a password';
  if (entry.compressionMethod !== methods.stored && entry.compressionMethod !== methods.deflated)
    return `It is packed by method ${entry.compressionMethod}; stored (0) and deflated (8) can be unpacked. Pack it anew`;
  return undefined;
}

/** Entries whose bytes begin before those of an earlier one, or of all, end: they are laid so to multiply when unpacked. */
function overlappingMembers(members: readonly Member[], directoryOffset: number): Set<Member> {
  const start = ({ entry }: Member) => entry.relativeOffsetOfLocalHeader;
  const overlapping = new Set<Member>();
  let end = 0;
  for (const member of [...members].sort((a, b) => start(a) - start(b))) {
    const { fileNameLength, compressedSize } = member.entry;
    const ownEnd = start(member) + localHeaderBytes + fileNameLength + compressedSize;
    if (start(member) < end || ownEnd > directoryOffset) overlapping.add(member);
    end = Math.max(end, ownEnd);
  }
  return overlapping;
}

function unreadable(error: unknown) {
  const why = error instanceof Error ? error.message : String(error);
  return problem(
    422,
    'archive-unreadable',
    `The ZIP archive cannot be read: ${shownPath(why)}. It may not be whole, or not be an ordinary ZIP; pack it anew and send it again`,
  );
}
