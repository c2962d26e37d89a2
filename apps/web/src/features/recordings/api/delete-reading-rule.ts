import { requestEmpty } from '../../../lib/http.js';

export function deleteReadingRule(ruleId: string): Promise<void> {
  return requestEmpty(`/reading-rules/${ruleId}`, { method: 'DELETE' });
}
