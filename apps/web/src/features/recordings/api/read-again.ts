import { recordingSchema, type ReadAgain, type Recording } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Reads the kept source once more under other options; earlier analyses are superseded. */
export function readAgain(recordingId: string, reading: ReadAgain): Promise<Recording> {
  return requestJson(recordingSchema, `/recordings/${recordingId}/read`, { method: 'POST', body: reading });
}
