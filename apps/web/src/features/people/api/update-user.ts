import { userSchema, type UpdateUser, type User } from '@overtally/contracts';
import { requestJson } from '../../../lib/http.js';

export function updateUser(userId: string, change: UpdateUser): Promise<User> {
  return requestJson(userSchema, `/users/${userId}`, { method: 'PATCH', body: change });
}
