import { recordingPageSchema, type RecordingQuery, type RecordingStatus } from '@overtally/contracts';
import { infiniteQueryOptions } from '@tanstack/react-query';
import { requestJson } from '../../../lib/http.js';
import { isBusy } from '../recording-status.js';

export interface RecordingFilter {
  q: string;
  status: RecordingStatus | null;
  /** Recordings of this equipment alone. */
  equipmentId?: string | null;
  sort: RecordingQuery['sort'];
}

/** Recordings of a project, page by page; asked again every second while one of them is being worked on. */
export const recordingsQuery = (projectId: string, filter: RecordingFilter) =>
  infiniteQueryOptions({
    queryKey: ['projects', projectId, 'recordings', filter],
    queryFn: ({ pageParam, signal }) =>
      requestJson(recordingPageSchema, `/projects/${projectId}/recordings`, {
        query: { ...filter, cursor: pageParam, limit: 50 },
        signal,
      }),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.nextCursor,
    refetchInterval: (query) =>
      query.state.data?.pages.some((page) => page.items.some(isBusy)) ? 1000 : false,
  });
