import { seriesSchema, type SeriesQuery } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

export type SeriesRequest = Pick<SeriesQuery, 'channel' | 'figure' | 'order' | 'aggregation'>;

/** A figure of a finished analysis from window to window, thinned by the largest value of each stretch. */
export const seriesQuery = (analysisId: string, wanted: SeriesRequest) =>
  queryOptions({
    queryKey: ['analyses', analysisId, 'series', wanted],
    queryFn: ({ signal }) =>
      requestJson(seriesSchema, `/analyses/${analysisId}/series`, {
        query: { ...wanted, maxPoints: 4000 },
        signal,
      }),
    staleTime: Infinity,
  });
