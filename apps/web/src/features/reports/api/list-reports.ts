import { reportPageSchema, type ReportStatus } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Reports of a project, the newest first. */
export const reportsQuery = (projectId: string, status: ReportStatus | null = null) =>
  queryOptions({
    queryKey: ['projects', projectId, 'reports', status],
    queryFn: ({ signal }) =>
      listAll(reportPageSchema, `/projects/${projectId}/reports`, { query: { status }, signal }),
  });
