import { recordingSortSchema, recordingStatusSchema } from '@overtally/contracts';
import { useCallback, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { RecordingFilter } from '../api/list-recordings.js';

/** What the list shows, kept in the address so that it can be sent and survives a reload. */
export function useRecordingFilter() {
  const [search, setSearch] = useSearchParams();
  const filter = useMemo<RecordingFilter>(() => {
    const status = recordingStatusSchema.safeParse(search.get('status'));
    const sort = recordingSortSchema.safeParse(search.get('sort'));
    return {
      q: search.get('q') ?? '',
      equipmentId: search.get('equipment'),
      status: status.success ? status.data : null,
      sort: sort.success ? sort.data : '-number',
    };
  }, [search]);
  const change = useCallback(
    (changes: Partial<Record<'q' | 'status' | 'sort' | 'limits' | 'equipment', string>>) =>
      setSearch(
        (before) => {
          const next = new URLSearchParams(before);
          for (const [name, value] of Object.entries(changes)) {
            if (value) next.set(name, value);
            else next.delete(name);
          }
          return next;
        },
        { replace: true },
      ),
    [setSearch],
  );
  return { filter, limitSetId: search.get('limits'), change };
}
