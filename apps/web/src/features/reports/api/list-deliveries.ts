import { mailPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Messages with an issued report, the newest first. */
export const deliveriesQuery = (reportId: string) =>
  queryOptions({
    queryKey: ['reports', reportId, 'deliveries'],
    queryFn: ({ signal }) => listAll(mailPageSchema, `/reports/${reportId}/deliveries`, { signal }),
    // While some wait, their standing may change at any time.
    refetchInterval: ({ state }) => (state.data?.some(({ status }) => status === 'queued') ? 3_000 : false),
  });
