import { unreadableFile } from './unreadable-file.js';
import type { DigestReply } from './digest.worker.js';

/**
 * SHA-256 of a file, worked out in a thread of its own while the page goes on. Rejects with an `ApiProblem`
 * where the file cannot be read, with an AbortError once `signal` fires.
 */
export function digestFile(file: File, signal: AbortSignal): Promise<string> {
  const worker = new Worker(new URL('./digest.worker.ts', import.meta.url), { type: 'module' });
  return new Promise<string>((resolve, reject) => {
    signal.addEventListener('abort', () => reject(new DOMException('Stopped', 'AbortError')), { once: true });
    worker.onmessage = ({ data }: MessageEvent<DigestReply>) => {
      if ('sha256' in data) resolve(data.sha256);
      else reject(unreadableFile(file.name));
    };
    worker.onerror = ({ message }) => reject(new Error(`The SHA-256 could not be worked out: ${message}`));
    worker.postMessage(file);
  }).finally(() => worker.terminate());
}
