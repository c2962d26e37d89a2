import { projectSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** One project with the role of the person who asks. */
export const projectQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId],
    queryFn: ({ signal }) => requestJson(projectSchema, `/projects/${projectId}`, { signal }),
  });
