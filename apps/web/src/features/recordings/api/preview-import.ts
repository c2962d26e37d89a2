import { importPreviewSchema, type ImportOptions, type ImportPreview } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** As much of a file's beginning as a preview needs, in bytes. */
export const headBytes = 256 * 1024;

/**
 * What reading `file` under `options` would give, judged by its first 256 KiB. Without options, those of the reading
 * rule that fits the file are taken. `sizeBytes` is the whole size.
 */
export function previewImport(
  projectId: string,
  file: File,
  options: ImportOptions | null,
  signal?: AbortSignal,
  sizeBytes = file.size,
): Promise<ImportPreview> {
  const body = new FormData();
  body.set('fileName', file.name);
  body.set('sizeBytes', String(sizeBytes));
  if (options) {
    body.set('import', JSON.stringify(options));
    body.set('readingRuleId', 'null');
  }
  body.set('head', file.slice(0, headBytes), file.name);
  return requestJson(importPreviewSchema, `/projects/${projectId}/import-preview`, {
    method: 'POST',
    body,
    ...(signal ? { signal } : {}),
  });
}
