import {
  studySchema,
  type CreateStudy,
  type SaveStudy,
  type Study,
  type UpdateStudy,
} from '@overtally/contracts';
import { requestEmpty, requestJson } from '../../../lib/http.js';

export function createStudy(projectId: string, input: CreateStudy): Promise<Study> {
  return requestJson(studySchema, `/projects/${projectId}/studies`, { method: 'POST', body: input });
}

/** Saves a new version; refused with 409 when somebody else saved one meanwhile. */
export function saveVersion(studyId: string, input: SaveStudy): Promise<Study> {
  return requestJson(studySchema, `/studies/${studyId}/versions`, { method: 'POST', body: input });
}

export function updateStudy(studyId: string, input: UpdateStudy): Promise<Study> {
  return requestJson(studySchema, `/studies/${studyId}`, { method: 'PATCH', body: input });
}

export function deleteStudy(studyId: string): Promise<void> {
  return requestEmpty(`/studies/${studyId}`, { method: 'DELETE' });
}
