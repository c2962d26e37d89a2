import { limitSetPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Published limit sets, and the custom ones of a project when it is named. */
export const limitSetsQuery = (projectId?: string) =>
  queryOptions({
    queryKey: ['limit-sets', projectId ?? null],
    queryFn: ({ signal }) => listAll(limitSetPageSchema, '/limit-sets', { query: { projectId }, signal }),
    staleTime: 5 * 60_000,
  });
