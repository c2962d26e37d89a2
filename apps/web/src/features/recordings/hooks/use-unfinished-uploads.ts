import type { UnfinishedUpload } from '@overtally/contracts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { notifyDone, notifyProblem } from '../../../components/notify.js';
import { unfinishedUploadsQuery } from '../api/upload-list.js';
import { dropUpload, uploadIdOf, uploadUrl } from '../api/upload-transfer.js';
import type { UploadItem } from '../upload-item.js';

/** Uploads that broke off, but for those on the list, and the way to give one up. */
export function useUnfinishedUploads(projectId: string, items: readonly UploadItem[]) {
  const queryClient = useQueryClient();
  const query = unfinishedUploadsQuery(projectId);
  const { data = [] } = useQuery(query);
  const [inDoubt, setInDoubt] = useState<UnfinishedUpload | null>(null);
  const discard = useMutation({
    mutationFn: ({ id }: UnfinishedUpload) => dropUpload(uploadUrl(projectId, id)),
    onSuccess: (_, { fileName }) => notifyDone(`What arrived of ${fileName} is discarded`),
    onError: (error) => notifyProblem('Not discarded', error),
    onSettled: () => {
      setInDoubt(null);
      return queryClient.invalidateQueries(query);
    },
  });
  const onList = new Set(items.flatMap(({ url }) => (url ? [uploadIdOf(url)] : [])));
  return {
    uploads: data.filter(({ id }) => !onList.has(id)),
    inDoubt,
    pending: discard.isPending,
    askToDiscard: setInDoubt,
    keep: () => setInDoubt(null),
    discard: () => inDoubt && discard.mutate(inDoubt),
  };
}
