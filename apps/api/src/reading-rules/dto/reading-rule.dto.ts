import {
  createReadingRuleSchema,
  readingRuleListSchema,
  readingRuleSchema,
  updateReadingRuleSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class ReadingRuleDto extends createZodDto(readingRuleSchema) {}
export class ReadingRuleListDto extends createZodDto(readingRuleListSchema) {}
export class CreateReadingRuleDto extends createZodDto(createReadingRuleSchema) {}
export class UpdateReadingRuleDto extends createZodDto(updateReadingRuleSchema) {}
