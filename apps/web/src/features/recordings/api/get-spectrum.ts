import { spectrumSchema, type Spectrum } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** Spectrum or amplitude density of one channel of a finished analysis, thinned by the largest line of each bin. */
export const spectrumQuery = (
  analysisId: string,
  channel: number,
  scaling: Spectrum['scaling'] = 'spectrum',
) =>
  queryOptions({
    queryKey: ['analyses', analysisId, 'spectrum', channel, scaling],
    queryFn: ({ signal }) =>
      requestJson(spectrumSchema, `/analyses/${analysisId}/spectrum`, {
        query: { channel, maxPoints: 4000, scaling },
        signal,
      }),
    staleTime: Infinity,
  });
