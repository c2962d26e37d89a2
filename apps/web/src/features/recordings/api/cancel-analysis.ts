import { analysisSchema, type Analysis } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function cancelAnalysis(analysisId: string): Promise<Analysis> {
  return requestJson(analysisSchema, `/analyses/${analysisId}/cancel`, { method: 'POST' });
}
