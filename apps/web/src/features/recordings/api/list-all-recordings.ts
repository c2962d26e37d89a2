import { recordingPageSchema } from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { listAll } from '../../../lib/list-all.js';

/** Every recording of a project, for lists that name recordings beside something else. */
export const allRecordingsQuery = (projectId: string) =>
  queryOptions({
    queryKey: ['projects', projectId, 'all-recordings'],
    queryFn: ({ signal }) => listAll(recordingPageSchema, `/projects/${projectId}/recordings`, { signal }),
  });
