import { queryClient } from '../../../lib/query-client.js';
import { unfinishedUploadsQuery } from '../api/upload-list.js';
import { rememberedUploads, uploadUrl } from '../api/upload-transfer.js';

/**
 * Address of an upload of the same file that broke off and that the server still has: by this browser's own memory
 * of the file, else by name and size. null where there is none. `taken` are uploads that are under way.
 */
export async function findEarlierUpload(
  projectId: string,
  file: File,
  taken: ReadonlySet<string>,
): Promise<string | null> {
  const all = await queryClient.fetchQuery({
    ...unfinishedUploadsQuery(projectId),
    staleTime: 0,
    retry: false,
  });
  const unfinished = all.filter(({ id, sizeBytes }) => !taken.has(id) && sizeBytes === file.size);
  if (unfinished.length === 0) return null;
  const remembered = await rememberedUploads(projectId, file);
  const known = remembered.find((id) => unfinished.some((upload) => upload.id === id));
  const id = known ?? unfinished.find(({ fileName }) => fileName === file.name)?.id;
  return id === undefined ? null : uploadUrl(projectId, id);
}
