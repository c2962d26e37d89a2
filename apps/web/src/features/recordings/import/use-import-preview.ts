import type { ImportOptions } from '@overtally/contracts';
import { keepPreviousData, skipToken, useQuery } from '@tanstack/react-query';
import { previewImport } from '../api/preview-import.js';

/** The beginning of a file, and the size of the whole. */
export interface PreviewSource {
  file: File;
  sizeBytes: number;
}

/**
 * What reading a file under `options` gives; null: by the reading rule that fits it. The preview before stays while
 * another one is fetched.
 */
export function useImportPreview(
  projectId: string,
  source: PreviewSource | undefined,
  options: ImportOptions | null,
) {
  return useQuery({
    queryKey: [
      'import-preview',
      projectId,
      source?.file.name,
      source?.sizeBytes,
      source?.file.lastModified,
      options,
    ],
    queryFn: source
      ? ({ signal }) => previewImport(projectId, source.file, options, signal, source.sizeBytes)
      : skipToken,
    placeholderData: keepPreviousData,
    staleTime: Infinity,
    retry: false,
  });
}
