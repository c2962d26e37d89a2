import { reportPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Reports of a project, the newest first. */
export const reportsQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'reports'],
    queryFn: ({ signal }) => listAll(reportPageSchema, `/projects/${projectId}/reports`, { signal }),
  });
