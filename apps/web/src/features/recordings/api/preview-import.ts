import { importPreviewSchema, type ImportOptions, type ImportPreview } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** As much of a file's beginning as a preview needs, in bytes. */
const headBytes = 256 * 1024;

/** What reading `file` under `options` would give, judged by its first 256 KiB. */
export function previewImport(
  projectId: string,
  file: File,
  options: ImportOptions,
  signal?: AbortSignal,
): Promise<ImportPreview> {
  const body = new FormData();
  body.set('fileName', file.name);
  body.set('sizeBytes', String(file.size));
  body.set('import', JSON.stringify(options));
  body.set('head', file.slice(0, headBytes), file.name);
  return requestJson(importPreviewSchema, `/projects/${projectId}/import-preview`, {
    method: 'POST',
    body,
    ...(signal ? { signal } : {}),
  });
}
