import { analysisSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** One analysis; asked again every half second until it has ended. */
export const analysisQuery = (analysisId: string) =>
  queryOptions({
    queryKey: ['analyses', analysisId],
    queryFn: ({ signal }) => requestJson(analysisSchema, `/analyses/${analysisId}`, { signal }),
    refetchInterval: (query) => {
      const status = query.state.data?.status;
      return status === 'queued' || status === 'running' ? 500 : false;
    },
  });
