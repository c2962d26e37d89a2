import { requestEmpty } from '../../../lib/http.js';

export function deleteRecording(recordingId: string): Promise<void> {
  return requestEmpty(`/recordings/${recordingId}`, { method: 'DELETE' });
}
