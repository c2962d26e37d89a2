import { useQuery } from '@tanstack/react-query';
import { projectVerdictsQuery } from '../../../features/limits/api/list-verdicts.js';
import { studiesQuery } from '../../../features/studies/api/list-studies.js';
import { allRecordingsQuery } from '../../../features/recordings/api/list-all-recordings.js';

/** Verdicts of a project with the recordings they are on, and its studies, for choosing among them. */
export function useJudged(projectId: string, enabled = true) {
  const verdicts = useQuery({ ...projectVerdictsQuery(projectId), enabled });
  const recordings = useQuery({ ...allRecordingsQuery(projectId), enabled });
  const studies = useQuery({ ...studiesQuery(projectId), enabled });
  const failed = [verdicts, recordings, studies].find(({ isError }) => isError);
  return {
    data:
      verdicts.data && recordings.data && studies.data
        ? { verdicts: verdicts.data, recordings: recordings.data, studies: studies.data }
        : undefined,
    error: failed?.error ?? null,
    refetch: () => void failed?.refetch(),
  };
}
