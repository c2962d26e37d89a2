import {
  commentReportSchema,
  createReportSchema,
  issueReportSchema,
  pageQuerySchema,
  reportPageSchema,
  reportSchema,
  reportStatusSchema,
  reportStepSchema,
  returnReportSchema,
  submitReportSchema,
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
export class SubmitReportDto extends createZodDto(submitReportSchema) {}
export class IssueReportDto extends createZodDto(issueReportSchema) {}
export class CommentReportDto extends createZodDto(commentReportSchema) {}
export class ReturnReportDto extends createZodDto(returnReportSchema) {}
