import { limitSetSchema, type CreateLimitSet, type LimitSet } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Makes a new version of a custom set; earlier ones stay as they are. */
export function addLimitSetVersion(limitSetId: string, input: CreateLimitSet): Promise<LimitSet> {
  return requestJson(limitSetSchema, `/limit-sets/${limitSetId}/versions`, { method: 'POST', body: input });
}
