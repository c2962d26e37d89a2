import { analysisPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** All analyses of a recording, newest first. */
export const analysesQuery = (recordingId: string) =>
  queryOptions({
    queryKey: ['recordings', recordingId, 'analyses'],
    queryFn: ({ signal }) => listAll(analysisPageSchema, `/recordings/${recordingId}/analyses`, { signal }),
  });
