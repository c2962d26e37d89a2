import { limitSetPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** All versions of a custom set, the newest first. */
export const limitSetVersionsQuery = (limitSetId: string) =>
  queryOptions({
    queryKey: ['limit-sets', 'versions', limitSetId],
    queryFn: ({ signal }) => listAll(limitSetPageSchema, `/limit-sets/${limitSetId}/versions`, { signal }),
  });
