import { projectSchema, type CreateProject, type Project } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function createProject(project: CreateProject): Promise<Project> {
  return requestJson(projectSchema, '/projects', { method: 'POST', body: project });
}
