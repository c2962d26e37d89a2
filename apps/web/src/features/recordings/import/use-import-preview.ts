import { keepPreviousData, skipToken, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { previewImport } from '../api/preview-import.js';
import { faultsOf, optionsOf, type ImportDraft } from './import-draft.js';

/** What the form's settings give, asked anew a moment after each change. */
export function useImportPreview(
  projectId: string,
  source: { file: File; sizeBytes: number } | undefined,
  draft: ImportDraft,
) {
  const [asked, setAsked] = useState(draft);
  useEffect(() => {
    if (Object.keys(faultsOf(draft)).length > 0) return;
    const timer = setTimeout(() => setAsked(draft), 300);
    return () => clearTimeout(timer);
  }, [draft]);
  // Columns are left out: they rename and scale, and every column has to stay in view to be kept or not.
  const options = optionsOf({ ...asked, columns: {} }, null);
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
