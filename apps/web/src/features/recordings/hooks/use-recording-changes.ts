import type { ReadAgain, Recording, Settings, UpdateRecording } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { cancelAnalysis } from '../api/cancel-analysis.js';
import { cancelReading } from '../api/cancel-reading.js';
import { createAnalysis } from '../api/create-analysis.js';
import { deleteRecording } from '../api/delete-recording.js';
import { recordingQuery } from '../api/get-recording.js';
import { readAgain } from '../api/read-again.js';
import { updateRecording } from '../api/update-recording.js';

/** What can be done to one recording, with what has to be fetched anew after it. */
export function useRecordingChanges({ id, projectId }: Pick<Recording, 'id' | 'projectId'>) {
  const queryClient = useQueryClient();
  const refreshLists = () =>
    queryClient.invalidateQueries({ queryKey: ['projects', projectId, 'recordings'] });
  const refresh = () =>
    Promise.all([queryClient.invalidateQueries({ queryKey: recordingQuery(id).queryKey }), refreshLists()]);
  const update = useMutation({
    mutationFn: (change: UpdateRecording) => updateRecording(id, change),
    onSuccess: async (recording) => {
      queryClient.setQueryData(recordingQuery(id).queryKey, recording);
      await refresh();
    },
  });
  const read = useMutation({
    mutationFn: (reading: ReadAgain) => readAgain(id, reading),
    onSuccess: async (recording) => {
      queryClient.setQueryData(recordingQuery(id).queryKey, recording);
      await refresh();
    },
  });
  const stopReading = useMutation({
    mutationFn: () => cancelReading(id),
    onSuccess: (recording) => {
      queryClient.setQueryData(recordingQuery(id).queryKey, recording);
    },
    // Also after a refusal: it was read in the meantime.
    onSettled: refresh,
  });
  const analyse = useMutation({
    mutationFn: (settings: Settings) => createAnalysis(id, settings),
    onSuccess: refresh,
  });
  const cancel = useMutation({
    mutationFn: cancelAnalysis,
    onSuccess: async (analysis) => {
      await queryClient.invalidateQueries({ queryKey: ['analyses', analysis.id] });
      await refresh();
    },
  });
  const remove = useMutation({
    mutationFn: () => deleteRecording(id),
    onSuccess: async () => {
      await refreshLists();
      await queryClient.invalidateQueries({ queryKey: ['projects', projectId], exact: true });
    },
  });
  return { update, read, stopReading, analyse, cancel, remove };
}
