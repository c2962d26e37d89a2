import {
  createVerdictSchema,
  idSchema,
  pageQuerySchema,
  verdictPageSchema,
  verdictSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

const projectVerdictQuerySchema = pageQuerySchema.extend({
  recordingId: idSchema.optional().describe('Verdicts on this recording alone'),
});

export class VerdictDto extends createZodDto(verdictSchema) {}
export class VerdictPageDto extends createZodDto(verdictPageSchema) {}
export class VerdictQueryDto extends createZodDto(pageQuerySchema) {}
export class ProjectVerdictQueryDto extends createZodDto(projectVerdictQuerySchema) {}
export class CreateVerdictDto extends createZodDto(createVerdictSchema) {}
