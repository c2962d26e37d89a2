import type { Invitation, InvitationState } from '@overtally/contracts';
import { toMail } from '../mails/mail-view.js';
import type { InvitationRow } from './invitations.repository.js';

type Dates = Pick<InvitationRow['invitation'], 'acceptedAt' | 'revokedAt' | 'expiresAt'>;

export function stateOf({ acceptedAt, revokedAt, expiresAt }: Dates, now: Date): InvitationState {
  if (acceptedAt !== null) return 'accepted';
  if (revokedAt !== null) return 'revoked';
  return expiresAt <= now ? 'expired' : 'open';
}

export function toInvitation({ invitation, inviterName, mail }: InvitationRow): Invitation {
  const { id, projectId, email, role, invitedById, createdAt, expiresAt, acceptedAt } = invitation;
  return {
    ...{ id, projectId, email, role },
    state: stateOf(invitation, new Date()),
    invitedBy: { id: invitedById, name: inviterName },
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    acceptedAt: acceptedAt?.toISOString() ?? null,
    mail: mail && toMail(mail),
  };
}
