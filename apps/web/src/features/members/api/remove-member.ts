import { requestEmpty } from '../../../lib/http.js';

export function removeMember(projectId: string, userId: string): Promise<void> {
  return requestEmpty(`/projects/${projectId}/members/${userId}`, { method: 'DELETE' });
}
