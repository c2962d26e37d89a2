import { unfinishedUploadListSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** Own uploads into the project that began and did not become recordings. */
export const unfinishedUploadsQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'uploads'],
    queryFn: async ({ signal }) =>
      (await requestJson(unfinishedUploadListSchema, `/projects/${projectId}/uploads`, { signal })).items,
  });
