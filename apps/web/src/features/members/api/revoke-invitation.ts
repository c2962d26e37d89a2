import { requestEmpty } from '../../../lib/http.js';

export function revokeInvitation(invitationId: string): Promise<void> {
  return requestEmpty(`/invitations/${invitationId}`, { method: 'DELETE' });
}
