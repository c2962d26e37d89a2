import { uploadLimitsSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** How large a file may be and how much the project may hold. */
export const uploadLimitsQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'upload-limits'],
    queryFn: ({ signal }) =>
      requestJson(uploadLimitsSchema, `/projects/${projectId}/upload-limits`, { signal }),
  });
