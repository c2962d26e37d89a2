import { projectPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Projects that the signed-in person may see. */
export const projectsQuery = () =>
  queryOptions({
    queryKey: ['projects'],
    queryFn: ({ signal }) => listAll(projectPageSchema, '/projects', { signal }),
  });
