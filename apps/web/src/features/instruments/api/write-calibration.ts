import { calibrationSchema, type Calibration, type CreateCalibration } from '@overtally/contracts';
import { requestEmpty, requestJson } from '../../../lib/http.js';

/** Enters a calibration, with its certificate where there is one. */
export function createCalibration(
  instrumentId: string,
  calibration: CreateCalibration,
  certificate: File | null,
): Promise<Calibration> {
  const form = new FormData();
  for (const [name, value] of Object.entries(calibration)) form.set(name, value);
  if (certificate) form.set('certificate', certificate, certificate.name);
  const body = certificate ? form : calibration;
  return requestJson(calibrationSchema, `/instruments/${instrumentId}/calibrations`, {
    method: 'POST',
    body,
  });
}

export function deleteCalibration(calibrationId: string): Promise<void> {
  return requestEmpty(`/calibrations/${calibrationId}`, { method: 'DELETE' });
}
