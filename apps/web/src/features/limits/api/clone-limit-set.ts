import { limitSetSchema, type CloneLimitSet, type LimitSet } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Copies a published set, or one of the project, into a set of the project's own. */
export function cloneLimitSet(projectId: string, input: CloneLimitSet): Promise<LimitSet> {
  return requestJson(limitSetSchema, `/projects/${projectId}/limit-sets/clone`, {
    method: 'POST',
    body: input,
  });
}
