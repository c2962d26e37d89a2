import type { Recording } from '@overtally/contracts';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import { analysisQuery } from '../api/get-analysis.js';
import { analysesQuery } from '../api/list-analyses.js';
import { isBusy } from '../recording-status.js';

/**
 * All analyses of the recording, the one shown (`askedId`, else the latest) and the one under way. The list is
 * followed while the recording is being worked on.
 */
export function useShownAnalysis(recording: Recording, askedId: string | null) {
  const queryClient = useQueryClient();
  const busy = isBusy(recording);
  const analyses = useQuery({ ...analysesQuery(recording.id), refetchInterval: busy ? 1000 : false });
  const { id, status, latestAnalysisId } = recording;
  useEffect(() => {
    void queryClient.invalidateQueries({ queryKey: analysesQuery(id).queryKey });
  }, [queryClient, id, status, latestAnalysisId]);
  const shownId = askedId ?? latestAnalysisId;
  const shown = useQuery({ ...analysisQuery(shownId ?? ''), enabled: shownId !== null });
  const list = analyses.data ?? [];
  const running = list.find((entry) => entry.status === 'queued' || entry.status === 'running') ?? null;
  return { list, shownId, shown, running };
}
