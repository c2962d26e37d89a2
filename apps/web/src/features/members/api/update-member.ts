import { memberSchema, type Member, type UpdateMember } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function updateMember(projectId: string, userId: string, change: UpdateMember): Promise<Member> {
  return requestJson(memberSchema, `/projects/${projectId}/members/${userId}`, {
    method: 'PATCH',
    body: change,
  });
}
