import {
  problemDetailsSchema,
  recordingSchema,
  type ImportOptions,
  type Recording,
} from '@overtally/contracts';
import { ApiProblem } from '../../../lib/api-problem.js';
import { apiUrl } from '../../../lib/http.js';

export interface Upload {
  file: File;
  options: ImportOptions;
  /** Called with the bytes sent so far, of the whole request. */
  onProgress: (sentBytes: number, totalBytes: number) => void;
  signal: AbortSignal;
}

/**
 * Sends a capture. XMLHttpRequest is used because fetch tells nothing of how far a request body has gone.
 * Rejects with an `ApiProblem`, or with an AbortError once `signal` fires.
 */
export function uploadRecording(projectId: string, upload: Upload): Promise<Recording> {
  const { file, options, onProgress, signal } = upload;
  const body = new FormData();
  body.set('import', JSON.stringify(options));
  body.set('file', file, file.name);
  return new Promise((resolve, reject) => {
    const sending = new XMLHttpRequest();
    const abort = () => sending.abort();
    sending.open('POST', apiUrl(`/projects/${projectId}/recordings`));
    sending.setRequestHeader('accept', 'application/json, application/problem+json');
    sending.upload.onprogress = (event) => onProgress(event.loaded, event.total);
    sending.onabort = () => reject(new DOMException('Upload stopped', 'AbortError'));
    sending.onerror = () => reject(connectionLost());
    sending.onload = () => {
      const outcome = outcomeOf(sending);
      if (outcome instanceof ApiProblem) reject(outcome);
      else resolve(outcome);
    };
    sending.onloadend = () => signal.removeEventListener('abort', abort);
    signal.addEventListener('abort', abort, { once: true });
    if (signal.aborted) reject(new DOMException('Upload stopped', 'AbortError'));
    else sending.send(body);
  });
}

const connectionLost = () =>
  new ApiProblem({
    status: 0,
    title: 'The connection was lost',
    detail: 'The upload did not arrive. Try it again.',
  });

function outcomeOf(sending: XMLHttpRequest): Recording | ApiProblem {
  const reply = parseJson(sending.responseText);
  if (sending.status === 202) {
    const recording = recordingSchema.safeParse(reply);
    if (recording.success) return recording.data;
  }
  const problem = problemDetailsSchema.safeParse(reply);
  return new ApiProblem(
    problem.success ? problem.data : { status: sending.status, title: 'The reply was not understood' },
  );
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return null;
  }
}
