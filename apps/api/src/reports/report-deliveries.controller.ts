import { Body, Controller, Get, Param, Post, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { MailDto, MailPageDto, PageQueryDto, SendReportDto } from '../mails/dto/mails.dto.js';
import { MailsService } from '../mails/mails.service.js';
import { ReportNotices } from './report-notices.service.js';

@ApiTags('reports')
@Controller('reports/:id/deliveries')
export class ReportDeliveriesController {
  constructor(
    private readonly mails: MailsService,
    private readonly notices: ReportNotices,
  ) {}

  @Get()
  @RequirePermission('delivery.read', { resource: 'report' })
  @ZodResponse({
    status: 200,
    type: MailPageDto,
    description: 'Messages with the issued report, newest first',
  })
  list(@Param('id') reportId: string, @Query() query: PageQueryDto) {
    return this.mails.page({ reportId, kind: 'report-issued' }, query);
  }

  @Post()
  @RequirePermission('delivery.send', { resource: 'report' })
  @ZodResponse({ status: 201, type: MailDto, description: 'The message to one more recipient, queued' })
  @ApiProblem(409, 'The report is not issued, or superseded')
  send(@Param('id') reportId: string, @Body() recipient: SendReportDto) {
    return this.notices.send(reportId, recipient);
  }
}
