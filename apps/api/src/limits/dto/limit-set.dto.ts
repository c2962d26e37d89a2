import {
  cloneLimitSetSchema,
  createLimitSetSchema,
  idSchema,
  limitSetPageSchema,
  limitSetSchema,
  updateLimitSetSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';
import { z } from 'zod';

const limitSetQuerySchema = z.object({
  projectId: idSchema.optional().describe('Custom sets of this project alone; absent: of all own projects'),
});
const limitTableQuerySchema = z.object({
  row: z.coerce
    .number()
    .int()
    .min(0)
    .max(20)
    .default(0)
    .describe('Which of the rows of a set that has them, from 0'),
});

export class LimitSetDto extends createZodDto(limitSetSchema) {}
export class LimitSetPageDto extends createZodDto(limitSetPageSchema) {}
export class LimitSetQueryDto extends createZodDto(limitSetQuerySchema) {}
export class LimitTableQueryDto extends createZodDto(limitTableQuerySchema) {}
export class CreateLimitSetDto extends createZodDto(createLimitSetSchema) {}
export class CloneLimitSetDto extends createZodDto(cloneLimitSetSchema) {}
export class UpdateLimitSetDto extends createZodDto(updateLimitSetSchema) {}
