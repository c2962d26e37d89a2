import { useEffect, useSyncExternalStore } from 'react';
import { queryClient } from '../../../lib/query-client.js';
import { isOpen, UploadQueue } from '../upload-queue.js';

const queues = new Map<string, UploadQueue>();

function queueOf(projectId: string): UploadQueue {
  let queue = queues.get(projectId);
  if (!queue) {
    queue = new UploadQueue(projectId, () => {
      void queryClient.invalidateQueries({ queryKey: ['projects', projectId, 'recordings'] });
      void queryClient.invalidateQueries({ queryKey: ['projects', projectId], exact: true });
    });
    queues.set(projectId, queue);
  }
  return queue;
}

/** Uploads of a project; warns before the page is left while one is under way. */
export function useUploadQueue(projectId: string) {
  const queue = queueOf(projectId);
  const items = useSyncExternalStore(queue.subscribe, queue.snapshot);
  const busy = items.some(isOpen);
  useEffect(() => {
    if (!busy) return;
    const warn = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', warn);
    return () => window.removeEventListener('beforeunload', warn);
  }, [busy]);
  return { queue, items, busy };
}
