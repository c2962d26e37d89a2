import { recordingSchema, type Recording } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function cancelReading(recordingId: string): Promise<Recording> {
  return requestJson(recordingSchema, `/recordings/${recordingId}/cancel-reading`, { method: 'POST' });
}
