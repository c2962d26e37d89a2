import { uploadOutcomeSchema, type FinishUpload, type UploadOutcome } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Makes recordings of an upload that arrived whole: one, or for an archive one for each capture in it. */
export function finishUpload(
  projectId: string,
  uploadId: string,
  finish: FinishUpload,
  signal?: AbortSignal,
): Promise<UploadOutcome> {
  return requestJson(uploadOutcomeSchema, `/projects/${projectId}/uploads/${uploadId}/recordings`, {
    method: 'POST',
    body: finish,
    ...(signal ? { signal } : {}),
  });
}
