import { reportCheckSchema } from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class ReportCheckDto extends createZodDto(reportCheckSchema) {}
