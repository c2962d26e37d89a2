import {
  equipmentSchema,
  type CreateEquipment,
  type Equipment,
  type UpdateEquipment,
} from '@overtally/contracts';
import { requestEmpty, requestJson } from '../../../lib/http.js';

export function createEquipment(projectId: string, body: CreateEquipment): Promise<Equipment> {
  return requestJson(equipmentSchema, `/projects/${projectId}/equipment`, { method: 'POST', body });
}

export function updateEquipment(equipmentId: string, body: UpdateEquipment): Promise<Equipment> {
  return requestJson(equipmentSchema, `/equipment/${equipmentId}`, { method: 'PATCH', body });
}

export function deleteEquipment(equipmentId: string): Promise<void> {
  return requestEmpty(`/equipment/${equipmentId}`, { method: 'DELETE' });
}
