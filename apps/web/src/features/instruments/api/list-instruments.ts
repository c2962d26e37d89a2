import { instrumentPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Every instrument of the laboratory, retired ones included. */
export const instrumentsQuery = () =>
  queryOptions({
    queryKey: ['laboratory', 'instruments'],
    queryFn: ({ signal }) => listAll(instrumentPageSchema, '/instruments', { signal }),
  });
