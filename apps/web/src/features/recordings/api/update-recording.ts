import { recordingSchema, type Recording, type UpdateRecording } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function updateRecording(recordingId: string, change: UpdateRecording): Promise<Recording> {
  return requestJson(recordingSchema, `/recordings/${recordingId}`, { method: 'PATCH', body: change });
}
