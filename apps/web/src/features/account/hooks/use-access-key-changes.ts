import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createAccessKey } from '../api/create-access-key.js';
import { deleteAccessKey } from '../api/delete-access-key.js';
import { accessKeysQuery } from '../api/list-access-keys.js';

/** Making and removing one's own access keys; the list follows. */
export function useAccessKeyChanges() {
  const queryClient = useQueryClient();
  const onSettled = () => queryClient.invalidateQueries({ queryKey: accessKeysQuery().queryKey });
  return {
    create: useMutation({ mutationFn: createAccessKey, onSettled, gcTime: 0 }),
    remove: useMutation({ mutationFn: deleteAccessKey, onSettled }),
  };
}
