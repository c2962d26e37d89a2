import { accessKeyPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** One's own access keys, the newest first. */
export const accessKeysQuery = () =>
  queryOptions({
    queryKey: ['access-keys'],
    queryFn: ({ signal }) => listAll(accessKeyPageSchema, '/auth/keys', { signal }),
  });
