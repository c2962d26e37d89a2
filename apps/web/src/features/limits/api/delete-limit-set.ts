import { requestEmpty } from '../../../lib/http.js';

/** Deletes a custom set; verdicts made with it keep their copy. */
export function deleteLimitSet(limitSetId: string): Promise<void> {
  return requestEmpty(`/limit-sets/${encodeURIComponent(limitSetId)}`, { method: 'DELETE' });
}
