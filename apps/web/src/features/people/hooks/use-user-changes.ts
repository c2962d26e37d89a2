import type { CreateUser, UpdateUser, User } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { createUser } from '../api/create-user.js';
import { usersQuery } from '../api/list-users.js';
import { updateUser } from '../api/update-user.js';

/** Adding and changing accounts; the list follows. */
export function useUserChanges() {
  const queryClient = useQueryClient();
  const onSettled = () => queryClient.invalidateQueries({ queryKey: usersQuery().queryKey });
  return {
    create: useMutation({ mutationFn: (user: CreateUser) => createUser(user), onSettled }),
    update: useMutation({
      mutationFn: ({ user, change }: { user: User; change: UpdateUser }) => updateUser(user.id, change),
      onSettled,
    }),
  };
}
