import { ownAccountSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** The signed-in person; refused with 401 when nobody is signed in. */
export const accountQuery = () =>
  queryOptions({
    queryKey: ['account'],
    queryFn: ({ signal }) => requestJson(ownAccountSchema, '/auth/me', { signal }),
    staleTime: 60_000,
  });
