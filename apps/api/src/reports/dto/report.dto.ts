import {
  createReportSchema,
  pageQuerySchema,
  reportPageSchema,
  reportSchema,
  reportStatusSchema,
  reportStepSchema,
  returnReportSchema,
  updateReportSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

const reportQuerySchema = pageQuerySchema.extend({ status: reportStatusSchema.optional() });

export class ReportDto extends createZodDto(reportSchema) {}
export class ReportPageDto extends createZodDto(reportPageSchema) {}
export class ReportQueryDto extends createZodDto(reportQuerySchema) {}
export class CreateReportDto extends createZodDto(createReportSchema) {}
export class UpdateReportDto extends createZodDto(updateReportSchema) {}
export class ReportStepDto extends createZodDto(reportStepSchema) {}
export class ReturnReportDto extends createZodDto(returnReportSchema) {}
