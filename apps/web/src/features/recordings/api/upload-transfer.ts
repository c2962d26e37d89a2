import {
  defaultOptions,
  DetailedError,
  Upload,
  type HttpResponse,
  type PreviousUpload,
  type UploadOptions,
} from 'tus-js-client';
import { ApiProblem, problemFrom } from '../../../lib/api-problem.js';
import { unreadableFile } from '../../../lib/digest/unreadable-file.js';
import { apiUrl } from '../../../lib/http.js';

export interface Transfer {
  file: File;
  /** Address of an upload that began before and goes on; null begins a new one. */
  url: string | null;
  /** Ends the sending without dropping what arrived; the promise rejects with an AbortError. */
  signal: AbortSignal;
  /** Called once the server has given the upload its address, or agreed to go on with `url`. */
  onUrl: (url: string) => void;
  /** Called with the bytes sent so far, those in flight included. */
  onProgress: (sentBytes: number) => void;
  /** Called when a try failed and the next one follows by itself. */
  onTrouble: (problem: ApiProblem) => void;
}

const chunkBytes = 16 * 1024 * 1024;
/** Milliseconds before each further try; they begin anew as soon as bytes arrive. */
const retryDelays = [500, 1000, 3000, 5000];

const uploadsUrl = (projectId: string) => apiUrl(`/projects/${projectId}/uploads`);

/** Address of an upload by its identifier. */
export const uploadUrl = (projectId: string, uploadId: string) => `${uploadsUrl(projectId)}/${uploadId}`;

/** Identifier of an upload by its address. */
export const uploadIdOf = (url: string): string => url.slice(url.lastIndexOf('/') + 1);

/** True where trying again later may help without anybody doing something about it. */
export const isPassing = (error: unknown): error is ApiProblem =>
  error instanceof ApiProblem && [0, 423, 429, 502, 503, 504].includes(error.status);

/**
 * Sends a file by tus 1.0 (https://tus.io/protocols/resumable-upload) and gives the address of the upload that
 * holds it whole. Rejects with an `ApiProblem`; its status is 0 where the server could not be reached.
 */
export function transferFile(projectId: string, transfer: Transfer): Promise<string> {
  const { file, signal } = transfer;
  return new Promise((resolve, reject) => {
    const stop = () => {
      void upload.abort();
      reject(stopped());
    };
    const end = (act: () => void) => {
      signal.removeEventListener('abort', stop);
      act();
    };
    const upload = new Upload(file, {
      ...optionsFor(projectId, file),
      uploadUrl: transfer.url,
      retryDelays,
      // The library may go on with preparations after it was told to stop: no request leaves then.
      onBeforeRequest: () => signal.throwIfAborted(),
      onUploadUrlAvailable: () => upload.url && transfer.onUrl(upload.url),
      onProgress: transfer.onProgress,
      onShouldRetry: (error) => {
        const status = statusOf(error);
        const again = navigator.onLine && (status === 0 || status >= 500 || [409, 423, 429].includes(status));
        if (again) transfer.onTrouble(new ApiProblem({ status, title: 'The server did not answer' }));
        return again;
      },
      onError: (error) => end(() => void problemOf(error, file).then(reject)),
      onSuccess: () => end(() => resolve(upload.url ?? '')),
    });
    signal.addEventListener('abort', stop, { once: true });
    upload
      .findPreviousUploads()
      .then((previous) => {
        const remembered = previous.find((one) => transfer.url && isSame(one, transfer.url));
        // Takes over the place in the browser's memory, so that it is given up when the file has arrived.
        if (remembered) upload.resumeFromPreviousUpload(remembered);
        if (signal.aborted) stop();
        else upload.start();
      })
      .catch(reject);
  });
}

const isSame = ({ uploadUrl: remembered }: PreviousUpload, url: string): boolean =>
  remembered !== null && uploadIdOf(remembered) === uploadIdOf(url);

/** Identifiers of the uploads of the same file into the project that this browser began, the latest first. */
export async function rememberedUploads(projectId: string, file: File): Promise<string[]> {
  const previous = await new Upload(file, optionsFor(projectId, file)).findPreviousUploads();
  return previous
    .toSorted((a, b) => Date.parse(b.creationTime) - Date.parse(a.creationTime))
    .flatMap(({ uploadUrl: url }) => (url ? [uploadIdOf(url)] : []));
}

/** Drops what the server has of an upload. One that it no longer knows counts as dropped. */
export async function dropUpload(url: string): Promise<void> {
  try {
    await Upload.terminate(url, { retryDelays: [] });
  } catch (error) {
    const problem = await problemOf(error);
    if (problem.status !== 404 && problem.status !== 410) throw problem;
  }
  const { urlStorage } = defaultOptions;
  const remembered = (await urlStorage.findAllUploads()).filter((one) => isSame(one, url));
  await Promise.all(remembered.map(({ urlStorageKey }) => urlStorage.removeUpload(urlStorageKey)));
}

const optionsFor = (projectId: string, file: File): UploadOptions => ({
  endpoint: new URL(uploadsUrl(projectId), location.origin).href,
  chunkSize: chunkBytes,
  metadata: { filename: file.name, filetype: file.type || 'application/octet-stream' },
  removeFingerprintOnSuccess: true,
});

const stopped = () => new DOMException('Upload stopped', 'AbortError');

const responseOf = (error: unknown): HttpResponse | null =>
  error instanceof DetailedError ? error.originalResponse : null;

const statusOf = (error: unknown): number => responseOf(error)?.getStatus() ?? 0;

async function problemOf(error: unknown, file?: File): Promise<ApiProblem> {
  const response = responseOf(error);
  if (response && response.getStatus() >= 200) {
    const headers = new Headers();
    for (const name of ['content-type', 'retry-after']) headers.set(name, response.getHeader(name) ?? '');
    return problemFrom(new Response(response.getBody() || null, { status: response.getStatus(), headers }));
  }
  // A file that was changed or removed meanwhile looks to the browser like a broken connection.
  if (file && !(await isReadable(file))) return unreadableFile(file.name);
  return new ApiProblem({
    status: 0,
    title: 'The connection was lost',
    detail: 'The connection to the server was lost.',
  });
}

const isReadable = (file: File): Promise<boolean> =>
  file
    .slice(0, 1)
    .arrayBuffer()
    .then(
      () => true,
      () => false,
    );
