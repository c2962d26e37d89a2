import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { ProjectAccess, RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { ProjectAccess as Access, SignedInUser } from '../common/request.js';
import {
  CreateReportDto,
  ReportDto,
  ReportPageDto,
  ReportQueryDto,
  UpdateReportDto,
} from './dto/report.dto.js';
import { ReportsService } from './reports.service.js';

@ApiTags('reports')
@Controller()
export class ReportsController {
  constructor(private readonly reports: ReportsService) {}

  @Post('projects/:id/reports')
  @RequirePermission('report.write', { resource: 'project' })
  @ZodResponse({ status: 201, type: ReportDto, description: 'The new draft' })
  @ApiProblem(409, 'The recording of a verdict was read or scaled anew since')
  @ApiProblem(422, 'A verdict that is not one of the project')
  create(@CurrentUser() user: SignedInUser, @Param('id') projectId: string, @Body() input: CreateReportDto) {
    return this.reports.create(user, projectId, input);
  }

  @Get('projects/:id/reports')
  @RequirePermission('report.read', { resource: 'project' })
  @ZodResponse({
    status: 200,
    type: ReportPageDto,
    description: 'The newest first; to guests, those that were issued',
  })
  list(@ProjectAccess() { projectId, role }: Access, @Query() query: ReportQueryDto) {
    return this.reports.list(projectId, role, query);
  }

  @Get('reports/:id')
  @RequirePermission('report.read', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto })
  read(@ProjectAccess() { role }: Access, @Param('id') id: string) {
    return this.reports.getFor(role, id);
  }

  @Patch('reports/:id')
  @RequirePermission('report.write', { resource: 'report' })
  @ZodResponse({ status: 200, type: ReportDto })
  @ApiProblem(409, 'The report is not a draft, or the recording of a verdict was read or scaled anew')
  @ApiProblem(422, 'A verdict that is not one of the project')
  update(
    @CurrentUser() user: SignedInUser,
    @ProjectAccess() { projectId }: Access,
    @Param('id') id: string,
    @Body() input: UpdateReportDto,
  ) {
    return this.reports.update(user, projectId, id, input);
  }

  @Delete('reports/:id')
  @HttpCode(204)
  @RequirePermission('report.write', { resource: 'report' })
  @ApiNoContentResponse({ description: 'Deleted' })
  @ApiProblem(409, 'The report is not a draft')
  delete(@Param('id') id: string) {
    return this.reports.delete(id);
  }
}
