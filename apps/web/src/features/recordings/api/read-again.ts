import { recordingSchema, type ImportOptions, type Recording } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

/** Reads the kept source once more under other options; earlier analyses are superseded. */
export function readAgain(recordingId: string, options: ImportOptions): Promise<Recording> {
  return requestJson(recordingSchema, `/recordings/${recordingId}/read`, { method: 'POST', body: options });
}
