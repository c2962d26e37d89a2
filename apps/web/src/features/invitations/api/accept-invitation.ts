import {
  acceptedInvitationSchema,
  type AcceptedInvitation,
  type AcceptInvitation,
} from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function acceptInvitation(input: AcceptInvitation): Promise<AcceptedInvitation> {
  return requestJson(acceptedInvitationSchema, '/invitations/accept', { method: 'POST', body: input });
}
