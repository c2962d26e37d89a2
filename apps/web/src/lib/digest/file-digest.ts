import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex } from '@noble/hashes/utils.js';

const sliceBytes = 1024 * 1024;

/** SHA-256 (FIPS 180-4) of a file as 64 hexadecimal digits, read slice by slice. Rejects where it cannot be read. */
export async function digestBlob(blob: Blob): Promise<string> {
  const hash = sha256.create();
  for (let start = 0; start < blob.size; start += sliceBytes) {
    hash.update(new Uint8Array(await blob.slice(start, start + sliceBytes).arrayBuffer()));
  }
  return bytesToHex(hash.digest());
}
