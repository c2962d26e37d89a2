import { studyPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Studies of a project, the newest first. */
export const studiesQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'studies'],
    queryFn: ({ signal }) => listAll(studyPageSchema, `/projects/${projectId}/studies`, { signal }),
  });
