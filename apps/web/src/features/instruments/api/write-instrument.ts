import {
  instrumentSchema,
  type CreateInstrument,
  type Instrument,
  type UpdateInstrument,
} from '@overtally/contracts';
import { requestEmpty, requestJson } from '../../../lib/http.js';

export function createInstrument(body: CreateInstrument): Promise<Instrument> {
  return requestJson(instrumentSchema, '/instruments', { method: 'POST', body });
}

export function updateInstrument(instrumentId: string, body: UpdateInstrument): Promise<Instrument> {
  return requestJson(instrumentSchema, `/instruments/${instrumentId}`, { method: 'PATCH', body });
}

export function deleteInstrument(instrumentId: string): Promise<void> {
  return requestEmpty(`/instruments/${instrumentId}`, { method: 'DELETE' });
}
