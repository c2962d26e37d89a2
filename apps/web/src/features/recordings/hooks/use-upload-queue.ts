import { useSyncExternalStore } from 'react';
import { queryClient } from '../../../lib/query-client.js';
import { uploadLimitsQuery } from '../api/upload-limits.js';
import { unfinishedUploadsQuery } from '../api/upload-list.js';
import { isPassing } from '../api/upload-transfer.js';
import { isOpen } from '../upload-item.js';
import { UploadQueue } from '../upload-queue.js';
import { digestFile } from '../../../lib/digest/digest-file.js';

const queues = new Map<string, UploadQueue>();

function queueOf(projectId: string): UploadQueue {
  let queue = queues.get(projectId);
  if (!queue) {
    queue = makeQueue(projectId);
    warnBeforeLeaving(queue);
    queues.set(projectId, queue);
  }
  return queue;
}

const makeQueue = (projectId: string) =>
  new UploadQueue(projectId, {
    limits: () =>
      queryClient
        .fetchQuery({ ...uploadLimitsQuery(projectId), staleTime: 0, retry: false })
        .catch((error: unknown) => {
          // The server checks in any case; without a connection the queue waits for it.
          if (isPassing(error)) return null;
          throw error;
        }),
    digest: digestFile,
    onArrived: () => {
      void queryClient.invalidateQueries({ queryKey: ['projects', projectId, 'recordings'] });
      void queryClient.invalidateQueries({ queryKey: ['projects', projectId], exact: true });
    },
    onUnfinished: () => void queryClient.invalidateQueries(unfinishedUploadsQuery(projectId)),
  });

/** Has the browser ask before the product is left while an upload is under way, whatever page is shown. */
function warnBeforeLeaving(queue: UploadQueue): void {
  const warn = (event: BeforeUnloadEvent) => event.preventDefault();
  queue.subscribe(() => {
    if (queue.snapshot().some(isOpen)) window.addEventListener('beforeunload', warn);
    else window.removeEventListener('beforeunload', warn);
  });
}

/** Uploads of a project. They go on while other pages are shown. */
export function useUploadQueue(projectId: string) {
  const queue = queueOf(projectId);
  const items = useSyncExternalStore(queue.subscribe, queue.snapshot);
  return { queue, items };
}
