import { readingRuleSchema, type ReadingRule, type UpdateReadingRule } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function updateReadingRule(ruleId: string, change: UpdateReadingRule): Promise<ReadingRule> {
  return requestJson(readingRuleSchema, `/reading-rules/${ruleId}`, { method: 'PATCH', body: change });
}
