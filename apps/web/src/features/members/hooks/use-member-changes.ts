import type { AddMember, Member, ProjectRole } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { addMember } from '../api/add-member.js';
import { membersQuery } from '../api/list-members.js';
import { removeMember } from '../api/remove-member.js';
import { updateMember } from '../api/update-member.js';

/** Adding, changing and removing members; the list and the project's own role and counts follow. */
export function useMemberChanges(projectId: string) {
  const queryClient = useQueryClient();
  const onSettled = () =>
    Promise.all([
      queryClient.invalidateQueries({ queryKey: membersQuery(projectId).queryKey }),
      queryClient.invalidateQueries({ queryKey: ['projects', projectId], exact: true }),
      queryClient.invalidateQueries({ queryKey: ['project-list'] }),
    ]);
  return {
    add: useMutation({ mutationFn: (member: AddMember) => addMember(projectId, member), onSettled }),
    changeRole: useMutation({
      mutationFn: ({ member, role }: { member: Member; role: ProjectRole }) =>
        updateMember(projectId, member.userId, { role }),
      onSettled,
    }),
    remove: useMutation({
      mutationFn: (member: Member) => removeMember(projectId, member.userId),
      onSettled,
    }),
  };
}
