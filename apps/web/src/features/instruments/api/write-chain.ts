import {
  measuringChainListItemSchema,
  type MeasuringChainListItem,
  type UpdateChain,
  type WriteChain,
} from '@overtally/contracts';
import { requestEmpty, requestJson } from '../../../lib/http.js';

export function createChain(body: WriteChain): Promise<MeasuringChainListItem> {
  return requestJson(measuringChainListItemSchema, '/measuring-chains', { method: 'POST', body });
}

export function updateChain(chainId: string, body: UpdateChain): Promise<MeasuringChainListItem> {
  return requestJson(measuringChainListItemSchema, `/measuring-chains/${chainId}`, { method: 'PATCH', body });
}

export function deleteChain(chainId: string): Promise<void> {
  return requestEmpty(`/measuring-chains/${chainId}`, { method: 'DELETE' });
}
