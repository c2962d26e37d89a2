import { verdictSchema, type CreateVerdict, type Verdict } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function createVerdict(analysisId: string, input: CreateVerdict): Promise<Verdict> {
  return requestJson(verdictSchema, `/analyses/${analysisId}/verdicts`, { method: 'POST', body: input });
}
