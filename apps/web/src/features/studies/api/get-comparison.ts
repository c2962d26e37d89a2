import { studyComparisonSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** What a version of a study predicted against what a recording of the built stages shows. */
export const comparisonQuery = (studyId: string, version: number, analysisId: string, channel: number) =>
  queryOptions({
    queryKey: ['studies', studyId, 'comparison', version, analysisId, channel],
    queryFn: ({ signal }) =>
      requestJson(studyComparisonSchema, `/studies/${studyId}/comparison`, {
        query: { version, analysisId, channel },
        signal,
      }),
    retry: false,
  });
