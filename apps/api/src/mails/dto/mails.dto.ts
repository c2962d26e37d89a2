import {
  idSchema,
  mailboxPageSchema,
  mailMessageSchema,
  mailPageSchema,
  mailQuerySchema,
  mailSchema,
  pageQuerySchema,
  sendReportSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';
import { z } from 'zod';

export class MailDto extends createZodDto(mailSchema) {}
export class MailPageDto extends createZodDto(mailPageSchema) {}
export class MailboxPageDto extends createZodDto(mailboxPageSchema) {}
export class MailMessageDto extends createZodDto(mailMessageSchema) {}
export class MailQueryDto extends createZodDto(mailQuerySchema) {}
export class PageQueryDto extends createZodDto(pageQuerySchema) {}
export class SendReportDto extends createZodDto(sendReportSchema) {}
export class AttachmentParams extends createZodDto(
  z.object({ id: idSchema, position: z.coerce.number().int().min(0).max(99) }),
) {}
