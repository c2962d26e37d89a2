import { createLimitSetSchema, idSchema, limitSetPageSchema, limitSetSchema } from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';
import { z } from 'zod';

const limitSetQuerySchema = z.object({
  projectId: idSchema.optional().describe('Custom sets of this project alone; absent: of all own projects'),
});

export class LimitSetDto extends createZodDto(limitSetSchema) {}
export class LimitSetPageDto extends createZodDto(limitSetPageSchema) {}
export class LimitSetQueryDto extends createZodDto(limitSetQuerySchema) {}
export class CreateLimitSetDto extends createZodDto(createLimitSetSchema) {}
