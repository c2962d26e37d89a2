import { instrumentSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

export const instrumentQuery = (instrumentId: string) =>
  queryOptions({
    queryKey: ['laboratory', 'instruments', instrumentId],
    queryFn: ({ signal }) => requestJson(instrumentSchema, `/instruments/${instrumentId}`, { signal }),
  });
