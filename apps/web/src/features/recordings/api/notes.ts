import {
  notePageSchema,
  noteSchema,
  type CreateNote,
  type Note,
  type UpdateNote,
} from '@overtally/contracts';
import { queryOptions } from '@tanstack/react-query';
import { requestEmpty, requestJson } from '../../../lib/http.js';
import { listAll } from '../../../lib/list-all.js';

/** Notes of an analysis, oldest first, so that their letters stay as more are written. */
export const notesQuery = (analysisId: string) =>
  queryOptions({
    queryKey: ['analyses', analysisId, 'notes'],
    queryFn: ({ signal }) => listAll(notePageSchema, `/analyses/${analysisId}/notes`, { signal }),
  });

export function createNote(analysisId: string, note: CreateNote): Promise<Note> {
  return requestJson(noteSchema, `/analyses/${analysisId}/notes`, { method: 'POST', body: note });
}

export function updateNote(noteId: string, change: UpdateNote): Promise<Note> {
  return requestJson(noteSchema, `/notes/${noteId}`, { method: 'PATCH', body: change });
}

export function deleteNote(noteId: string): Promise<void> {
  return requestEmpty(`/notes/${noteId}`, { method: 'DELETE' });
}
