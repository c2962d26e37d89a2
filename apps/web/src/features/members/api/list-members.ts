import { memberPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Members of a project. */
export const membersQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'members'],
    queryFn: ({ signal }) => listAll(memberPageSchema, `/projects/${projectId}/members`, { signal }),
  });
