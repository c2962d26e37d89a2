import { studySchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';

/** A study as of one of its versions, the newest when none is named. */
export const studyQuery = (studyId: string, version: number | null = null) =>
  queryOptions({
    queryKey: ['studies', studyId, version],
    queryFn: ({ signal }) => requestJson(studySchema, `/studies/${studyId}`, { query: { version }, signal }),
  });
