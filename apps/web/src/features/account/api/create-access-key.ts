import { createdAccessKeySchema, type CreateAccessKey, type CreatedAccessKey } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function createAccessKey(key: CreateAccessKey): Promise<CreatedAccessKey> {
  return requestJson(createdAccessKeySchema, '/auth/keys', { method: 'POST', body: key });
}
