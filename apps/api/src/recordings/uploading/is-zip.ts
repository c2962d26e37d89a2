import { open } from 'node:fs/promises';

/** First bytes of ZIP files: a member, an archive without members, one of several volumes (PKWARE APPNOTE, 4.3.7, 4.3.16, 8.5.3). */
const signatures = ['504b0304', '504b0506', '504b0708'];

/** Bytes at the beginning of a file that tell whether it is a ZIP archive. */
export const zipHeadBytes = 4;

/** Whether a file that begins so is a ZIP archive; its name does not count. */
export function isZip(head: Uint8Array): boolean {
  return signatures.includes(Buffer.from(head.subarray(0, zipHeadBytes)).toString('hex'));
}

/** The same of a local file. */
export async function fileIsZip(path: string): Promise<boolean> {
  const handle = await open(path, 'r');
  try {
    const { buffer, bytesRead } = await handle.read(new Uint8Array(zipHeadBytes), 0, zipHeadBytes, 0);
    return isZip(buffer.subarray(0, bytesRead));
  } finally {
    await handle.close();
  }
}
