import { laboratorySchema, updateLaboratorySchema } from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class LaboratoryDto extends createZodDto(laboratorySchema) {}
export class UpdateLaboratoryDto extends createZodDto(updateLaboratorySchema) {}
