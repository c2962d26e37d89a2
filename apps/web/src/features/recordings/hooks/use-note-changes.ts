import type { CreateNote, Note, UpdateNote } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { createNote, deleteNote, notesQuery, updateNote } from '../api/notes.js';

/** Writing, changing and deleting the notes of an analysis; a deleted one can be written back. */
export function useNoteChanges(analysisId: string) {
  const queryClient = useQueryClient();
  const refresh = () => queryClient.invalidateQueries({ queryKey: notesQuery(analysisId).queryKey });
  const create = useMutation({
    mutationFn: (note: CreateNote) => createNote(analysisId, note),
    onSuccess: refresh,
  });
  const update = useMutation({
    mutationFn: ({ id, change }: { id: string; change: UpdateNote }) => updateNote(id, change),
    onSuccess: refresh,
  });
  const remove = useMutation({
    mutationFn: (note: Note) => deleteNote(note.id),
    onSuccess: async (_, { channel, target, text, cause }) => {
      await refresh();
      notifyDone('Note deleted', () =>
        create.mutate(
          { channel, target, text, cause },
          { onError: (error) => notifyProblem('The note was not brought back', error) },
        ),
      );
    },
    onError: (error) => notifyProblem('The note was not deleted', error),
  });
  return { create, update, remove };
}
