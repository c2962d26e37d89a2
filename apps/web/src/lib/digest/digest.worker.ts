import { digestBlob } from './file-digest.js';

/** What comes back: the SHA-256, or why there is none. */
export type DigestReply = { sha256: string } | { fault: string };

addEventListener('message', ({ data }: MessageEvent<Blob>) => {
  digestBlob(data)
    .then<DigestReply, DigestReply>(
      (sha256) => ({ sha256 }),
      (error: unknown) => ({ fault: String(error) }),
    )
    .then((reply) => postMessage(reply))
    .catch(reportError);
});
