import { createHash } from 'node:crypto';

/**
 * The id of the recording that a file of an upload becomes: a UUID of version 5 (RFC 9562, 5.5) in the name space of the
 * upload, so that the same file cannot become two recordings.
 * @param path of the file in an archive; empty for an upload that is the capture itself
 */
export function memberRecordingId(uploadId: string, path: string): string {
  const bytes = createHash('sha1')
    .update(Buffer.from(uploadId.replaceAll('-', ''), 'hex'))
    .update(path, 'utf8')
    .digest()
    .subarray(0, 16);
  bytes[6] = (bytes[6]! & 0x0f) | 0x50;
  bytes[8] = (bytes[8]! & 0x3f) | 0x80;
  return bytes.toString('hex').replace(/^(.{8})(.{4})(.{4})(.{4})(.{12})$/, '$1-$2-$3-$4-$5');
}
