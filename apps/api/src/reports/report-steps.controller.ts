import { Body, Controller, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { SignedInUser } from '../common/request.js';
import { ReportDto, ReportStepDto, ReturnReportDto } from './dto/report.dto.js';
import { ReportStepsService } from './report-steps.service.js';

@ApiTags('reports')
@Controller('reports/:id')
export class ReportStepsController {
  constructor(private readonly steps: ReportStepsService) {}

  @Post('submit')
  @RequirePermission('report.submit', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto, description: 'Now in review' })
  @ApiProblem(409, 'The report is not a draft, or the recording of a verdict was read or scaled anew')
  submit(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() { comment }: ReportStepDto) {
    return this.steps.submit(user, id, comment);
  }

  @Post('return')
  @RequirePermission('report.decide', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto, description: 'A draft again' })
  @ApiProblem(409, 'The report is not in review')
  return(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() { comment }: ReturnReportDto) {
    return this.steps.return(user, id, comment);
  }

  @Post('issue')
  @RequirePermission('report.decide', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto, description: 'Issued and frozen' })
  @ApiProblem(409, 'The report is not in review, or the recording of a verdict was read or scaled anew')
  issue(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() { comment }: ReportStepDto) {
    return this.steps.issue(user, id, comment);
  }
}
