import { spectrumSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** Spectrum of one channel of a finished analysis, thinned by the largest line of each bin. */
export const spectrumQuery = (analysisId: string, channel: number) =>
  queryOptions({
    queryKey: ['analyses', analysisId, 'spectrum', channel],
    queryFn: ({ signal }) =>
      requestJson(spectrumSchema, `/analyses/${analysisId}/spectrum`, {
        query: { channel, maxPoints: 4000 },
        signal,
      }),
    staleTime: Infinity,
  });
