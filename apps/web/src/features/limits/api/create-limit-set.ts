import { limitSetSchema, type CreateLimitSet, type LimitSet } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function createLimitSet(projectId: string, input: CreateLimitSet): Promise<LimitSet> {
  return requestJson(limitSetSchema, `/projects/${projectId}/limit-sets`, { method: 'POST', body: input });
}
