import {
  createStudySchema,
  saveStudySchema,
  studyComparisonQuerySchema,
  studyComparisonSchema,
  studyPageSchema,
  studyQuerySchema,
  studySchema,
  studyVersionQuerySchema,
  updateStudySchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class StudyDto extends createZodDto(studySchema) {}
export class StudyPageDto extends createZodDto(studyPageSchema) {}
export class StudyQueryDto extends createZodDto(studyQuerySchema) {}
export class StudyVersionQueryDto extends createZodDto(studyVersionQuerySchema) {}
export class StudyComparisonDto extends createZodDto(studyComparisonSchema) {}
export class StudyComparisonQueryDto extends createZodDto(studyComparisonQuerySchema) {}
export class CreateStudyDto extends createZodDto(createStudySchema) {}
export class SaveStudyDto extends createZodDto(saveStudySchema) {}
export class UpdateStudyDto extends createZodDto(updateStudySchema) {}
