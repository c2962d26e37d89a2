import {
  createEquipmentSchema,
  equipmentPageSchema,
  equipmentQuerySchema,
  equipmentSchema,
  updateEquipmentSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class EquipmentDto extends createZodDto(equipmentSchema) {}
export class EquipmentPageDto extends createZodDto(equipmentPageSchema) {}
export class EquipmentQueryDto extends createZodDto(equipmentQuerySchema) {}
export class CreateEquipmentDto extends createZodDto(createEquipmentSchema) {}
export class UpdateEquipmentDto extends createZodDto(updateEquipmentSchema) {}
