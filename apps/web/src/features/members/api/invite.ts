import { invitationSchema, type CreateInvitation, type Invitation } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function invite(projectId: string, input: CreateInvitation): Promise<Invitation> {
  return requestJson(invitationSchema, `/projects/${projectId}/invitations`, { method: 'POST', body: input });
}
