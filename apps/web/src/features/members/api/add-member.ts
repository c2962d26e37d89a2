import { memberSchema, type AddMember, type Member } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function addMember(projectId: string, member: AddMember): Promise<Member> {
  return requestJson(memberSchema, `/projects/${projectId}/members`, { method: 'POST', body: member });
}
