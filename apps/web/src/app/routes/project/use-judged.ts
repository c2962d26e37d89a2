import { useQuery } from '@tanstack/react-query';
import { projectVerdictsQuery } from '../../../features/limits/api/list-verdicts.js';
import { allRecordingsQuery } from '../../../features/recordings/api/list-all-recordings.js';

/** Verdicts of a project with the recordings they are on, for choosing among them. */
export function useJudged(projectId: string, enabled = true) {
  const verdicts = useQuery({ ...projectVerdictsQuery(projectId), enabled });
  const recordings = useQuery({ ...allRecordingsQuery(projectId), enabled });
  const failed = verdicts.isError ? verdicts : recordings.isError ? recordings : null;
  return {
    data:
      verdicts.data && recordings.data ? { verdicts: verdicts.data, recordings: recordings.data } : undefined,
    error: failed?.error ?? null,
    refetch: () => void failed?.refetch(),
  };
}
