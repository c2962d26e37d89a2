import { analysisSchema, type Analysis, type Settings } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function createAnalysis(recordingId: string, settings: Settings): Promise<Analysis> {
  return requestJson(analysisSchema, `/recordings/${recordingId}/analyses`, {
    method: 'POST',
    body: { settings },
  });
}
