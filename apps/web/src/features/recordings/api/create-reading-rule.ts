import { readingRuleSchema, type CreateReadingRule, type ReadingRule } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function createReadingRule(projectId: string, rule: CreateReadingRule): Promise<ReadingRule> {
  return requestJson(readingRuleSchema, `/projects/${projectId}/reading-rules`, {
    method: 'POST',
    body: rule,
  });
}
