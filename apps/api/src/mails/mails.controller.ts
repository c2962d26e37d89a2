import { Controller, Get, HttpCode, Param, Post, Query, StreamableFile } from '@nestjs/common';
import { ApiOkResponse, ApiProduces, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { IdParam } from '../common/id-param.dto.js';
import { present } from '../storage/missing-object.js';
import { AttachmentParams, MailboxPageDto, MailDto, MailMessageDto, MailQueryDto } from './dto/mails.dto.js';
import { MailsService } from './mails.service.js';

@ApiTags('mails')
@Controller('mails')
export class MailsController {
  constructor(private readonly mails: MailsService) {}

  @Get()
  @RequirePermission('mail.read')
  @ZodResponse({ status: 200, type: MailboxPageDto, description: 'All messages, the newest first' })
  list(@Query() query: MailQueryDto) {
    return this.mails.mailbox(query);
  }

  @Get(':id')
  @RequirePermission('mail.read')
  @ZodResponse({ status: 200, type: MailMessageDto })
  @ApiProblem(404, 'No such message')
  read(@Param() { id }: IdParam) {
    return this.mails.message(id);
  }

  @Get(':id/attachments/:position')
  @RequirePermission('mail.read')
  @ApiProduces('application/octet-stream')
  @ApiOkResponse({ description: 'The attached file', schema: { type: 'string', format: 'binary' } })
  @ApiProblem(404, 'No such message, or no attachment at this place')
  async attachment(@Param() { id, position }: AttachmentParams): Promise<StreamableFile> {
    const { bytes, file } = await present(this.mails.attachment(id, position));
    return new StreamableFile(bytes, {
      type: 'application/octet-stream',
      disposition: `attachment; filename*=UTF-8''${encodeURIComponent(file.fileName)}`,
      length: bytes.length,
    });
  }

  @Post(':id/retry')
  @HttpCode(200)
  @RequirePermission('mail.retry', { resource: 'mail' })
  @ZodResponse({ status: 200, type: MailDto, description: 'Queued, to be sent at once' })
  @ApiProblem(409, 'The message was sent, or is being sent')
  retry(@Param('id') id: string) {
    return this.mails.retry(id);
  }
}
