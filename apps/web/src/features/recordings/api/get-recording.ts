import { recordingSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';
import { isBusy } from '../recording-status.js';

/** One recording; asked again every half second while it is being worked on. */
export const recordingQuery = (recordingId: string) =>
  queryOptions({
    queryKey: ['recordings', recordingId],
    queryFn: ({ signal }) => requestJson(recordingSchema, `/recordings/${recordingId}`, { signal }),
    refetchInterval: (query) => (query.state.data && isBusy(query.state.data) ? 500 : false),
  });
