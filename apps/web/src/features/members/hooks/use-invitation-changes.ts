import type { CreateInvitation } from '@overtally/contracts';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { retryMail } from '../../../lib/retry-mail.js';
import { invite } from '../api/invite.js';
import { invitationsQuery } from '../api/list-invitations.js';
import { revokeInvitation } from '../api/revoke-invitation.js';

/** Inviting people, sending invitations again and taking them back; the list follows. */
export function useInvitationChanges(projectId: string) {
  const queryClient = useQueryClient();
  const onSettled = () => queryClient.invalidateQueries({ queryKey: invitationsQuery(projectId).queryKey });
  return {
    invite: useMutation({ mutationFn: (input: CreateInvitation) => invite(projectId, input), onSettled }),
    revoke: useMutation({ mutationFn: revokeInvitation, onSettled }),
    sendAgain: useMutation({ mutationFn: retryMail, onSettled }),
  };
}
