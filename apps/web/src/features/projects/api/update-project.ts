import { projectSchema, type Project, type UpdateProject } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function updateProject(projectId: string, change: UpdateProject): Promise<Project> {
  return requestJson(projectSchema, `/projects/${projectId}`, { method: 'PATCH', body: change });
}
