import { Body, Controller, Get, Param, Post, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { SignedInUser } from '../common/request.js';
import {
  CreateVerdictDto,
  ProjectVerdictQueryDto,
  VerdictDto,
  VerdictPageDto,
  VerdictQueryDto,
} from './dto/verdict.dto.js';
import { VerdictsService } from './verdicts.service.js';

@ApiTags('verdicts')
@Controller()
export class VerdictsController {
  constructor(private readonly verdicts: VerdictsService) {}

  @Post('analyses/:id/verdicts')
  @RequirePermission('verdict.create', { resource: 'analysis' })
  @ZodResponse({ status: 201, type: VerdictDto })
  @ApiProblem(
    409,
    'The analysis is not done, the recording was read or scaled anew since, or the set is retired',
  )
  @ApiProblem(
    422,
    'The analysis has no such channel, the project no such limit set, or repeats do not go together',
  )
  create(
    @CurrentUser() user: SignedInUser,
    @Param('id') analysisId: string,
    @Body() input: CreateVerdictDto,
  ) {
    return this.verdicts.create(user, analysisId, input);
  }

  @Get('analyses/:id/verdicts')
  @RequirePermission('verdict.read', { resource: 'analysis' })
  @ZodResponse({ status: 200, type: VerdictPageDto, description: 'The newest first' })
  listOfAnalysis(@Param('id') analysisId: string, @Query() query: VerdictQueryDto) {
    return this.verdicts.list({ analysisId }, query);
  }

  @Get('projects/:id/verdicts')
  @RequirePermission('verdict.read', { resource: 'project' })
  @ZodResponse({ status: 200, type: VerdictPageDto, description: 'The newest first' })
  listOfProject(@Param('id') projectId: string, @Query() { recordingId, ...paging }: ProjectVerdictQueryDto) {
    return this.verdicts.list({ projectId, recordingId }, paging);
  }

  @Get('verdicts/:id')
  @RequirePermission('verdict.read', { resource: 'verdict' })
  @ZodResponse({ status: 200, type: VerdictDto })
  read(@Param('id') id: string) {
    return this.verdicts.get(id);
  }
}
