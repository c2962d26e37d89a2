import { userPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Every account of the installation, for administrators. */
export const usersQuery = () =>
  queryOptions({
    queryKey: ['users'],
    queryFn: ({ signal }) => listAll(userPageSchema, '/users', { signal }),
  });
