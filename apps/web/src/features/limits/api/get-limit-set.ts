import { limitSetSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

export const limitSetQuery = (limitSetId: string) =>
  queryOptions({
    queryKey: ['limit-sets', 'one', limitSetId],
    queryFn: ({ signal }) =>
      requestJson(limitSetSchema, `/limit-sets/${encodeURIComponent(limitSetId)}`, { signal }),
    staleTime: 5 * 60_000,
  });
