import type { FileHandle } from 'node:fs/promises';

/** Node.js ends the process when one read asks for 2^31 bytes or more. */
const pieceBytes = 2 ** 30;

/**
 * Fills `bytes` from the file, beginning at `position`.
 * @throws Error when the file ends before that
 */
export async function readWhole(
  file: Pick<FileHandle, 'read'>,
  bytes: Uint8Array,
  position: number,
): Promise<void> {
  let filled = 0;
  while (filled < bytes.length) {
    const length = Math.min(pieceBytes, bytes.length - filled);
    const { bytesRead } = await file.read(bytes, filled, length, position + filled);
    if (bytesRead === 0) throw new Error('The stored object ends early');
    filled += bytesRead;
  }
}
