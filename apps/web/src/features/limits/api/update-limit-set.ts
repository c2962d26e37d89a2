import { limitSetSchema, type LimitSet, type UpdateLimitSet } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Retires a custom set with all its versions, or brings it back. */
export function updateLimitSet(limitSetId: string, input: UpdateLimitSet): Promise<LimitSet> {
  return requestJson(limitSetSchema, `/limit-sets/${limitSetId}`, { method: 'PATCH', body: input });
}
