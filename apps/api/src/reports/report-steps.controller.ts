import { Body, Controller, Param, Post } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { SignedInUser } from '../common/request.js';
import {
  CommentReportDto,
  IssueReportDto,
  ReportDto,
  ReportStepDto,
  ReturnReportDto,
  SubmitReportDto,
} from './dto/report.dto.js';
import { ReportIssueService } from './report-issue.service.js';
import { ReportRevisionsService } from './report-revisions.service.js';
import { ReportStepsService } from './report-steps.service.js';

@ApiTags('reports')
@Controller('reports/:id')
export class ReportStepsController {
  constructor(
    private readonly steps: ReportStepsService,
    private readonly issues: ReportIssueService,
    private readonly revisions: ReportRevisionsService,
  ) {}

  @Post('submit')
  @RequirePermission('report.submit', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto, description: 'Now in review' })
  @ApiProblem(409, 'The report is not a draft, or the recording of a verdict was read or scaled anew')
  @ApiProblem(422, 'A new revision without a reason')
  submit(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() input: SubmitReportDto) {
    return this.steps.submit(user, id, input);
  }

  @Post('withdraw')
  @RequirePermission('report.submit', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto, description: 'A draft again, taken back from review' })
  @ApiProblem(409, 'The report is not in review')
  withdraw(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() { comment }: ReportStepDto) {
    return this.steps.withdraw(user, id, comment);
  }

  @Post('return')
  @RequirePermission('report.decide', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto, description: 'A draft again, with what must be mended' })
  @ApiProblem(409, 'The report is not in review')
  return(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() { comment }: ReturnReportDto) {
    return this.steps.return(user, id, comment);
  }

  @Post('issue')
  @RequirePermission('report.decide', { resource: 'report' })
  @ZodResponse({
    status: 200,
    type: ReportDto,
    description: 'Issued and frozen; who prepared or submitted it is refused unless the project allows it',
  })
  @ApiProblem(
    409,
    'The report is not in review, the recording of a verdict was read or scaled anew, or calibration was overdue and no reason is given',
  )
  issue(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() input: IssueReportDto) {
    return this.issues.issue(user, id, input);
  }

  @Post('revise')
  @RequirePermission('report.write', { resource: 'report' })
  @ZodResponse({
    status: 201,
    type: ReportDto,
    description: 'A draft of the next revision under the same number',
  })
  @ApiProblem(409, 'The report is not issued, or a revision of it is under way')
  revise(@CurrentUser() user: SignedInUser, @Param('id') id: string) {
    return this.revisions.revise(user, id);
  }

  @Post('comments')
  @RequirePermission('report.comment', { resource: 'report' })
  @ZodResponse({ status: 201, type: ReportDto, description: 'With the comment as its last event' })
  comment(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() { comment }: CommentReportDto) {
    return this.steps.comment(user, id, comment);
  }
}
