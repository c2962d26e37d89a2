import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import {
  ProjectAccess,
  RequirePermission,
  type ProjectAccessValue,
} from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import {
  CreateStudyDto,
  SaveStudyDto,
  StudyComparisonDto,
  StudyComparisonQueryDto,
  StudyDto,
  StudyPageDto,
  StudyQueryDto,
  StudyVersionQueryDto,
  UpdateStudyDto,
} from './dto/study.dto.js';
import { StudiesService } from './studies.service.js';
import { StudyComparisons } from './study-comparisons.service.js';

@ApiTags('studies')
@Controller()
export class StudiesController {
  constructor(
    private readonly studies: StudiesService,
    private readonly comparisons: StudyComparisons,
  ) {}

  @Get('projects/:id/studies')
  @RequirePermission('study.read', { resource: 'project' })
  @ApiOperation({ summary: 'Studies of a project, the newest first' })
  @ZodResponse({ status: 200, type: StudyPageDto })
  list(@Param('id') projectId: string, @Query() query: StudyQueryDto) {
    return this.studies.list(projectId, query);
  }

  @Post('projects/:id/studies')
  @RequirePermission('study.write', { resource: 'project' })
  @ApiOperation({ summary: 'Save a study; the server works out what it predicts' })
  @ZodResponse({ status: 201, type: StudyDto })
  @ApiProblem(422, 'A stage, the input or the limits cannot be used; errors name the place')
  create(@CurrentUser() user: SignedInUser, @Param('id') projectId: string, @Body() input: CreateStudyDto) {
    return this.studies.create(user, projectId, input);
  }

  @Get('studies/:id')
  @RequirePermission('study.read', { resource: 'study' })
  @ApiOperation({ summary: 'A study as of one of its versions' })
  @ZodResponse({ status: 200, type: StudyDto })
  read(@Param('id') id: string, @Query() { version }: StudyVersionQueryDto) {
    return this.studies.get(id, version);
  }

  @Patch('studies/:id')
  @RequirePermission('study.write', { resource: 'study' })
  @ApiOperation({ summary: 'Rename a study, retire it or bring it back' })
  @ZodResponse({ status: 200, type: StudyDto })
  update(@Param('id') id: string, @Body() change: UpdateStudyDto) {
    return this.studies.update(id, change);
  }

  @Delete('studies/:id')
  @HttpCode(204)
  @RequirePermission('study.write', { resource: 'study' })
  @ApiOperation({ summary: 'Delete a study with all its versions' })
  @ApiNoContentResponse({ description: 'Deleted' })
  @ApiProblem(409, 'A report speaks of one of its versions: retire it instead')
  delete(@Param('id') id: string): Promise<void> {
    return this.studies.delete(id);
  }

  @Post('studies/:id/versions')
  @RequirePermission('study.write', { resource: 'study' })
  @ApiOperation({ summary: 'Save a new version; the earlier ones stay' })
  @ZodResponse({ status: 201, type: StudyDto })
  @ApiProblem(409, 'There is a newer version by now')
  @ApiProblem(422, 'A stage, the input or the limits cannot be used; errors name the place')
  addVersion(
    @CurrentUser() user: SignedInUser,
    @ProjectAccess() { projectId }: ProjectAccessValue,
    @Param('id') id: string,
    @Body() input: SaveStudyDto,
  ) {
    return this.studies.addVersion(user, projectId, id, input);
  }

  @Get('studies/:id/comparison')
  @RequirePermission('study.read', { resource: 'study' })
  @ApiOperation({ summary: 'What a version predicts against what was measured, order by order' })
  @ZodResponse({ status: 200, type: StudyComparisonDto })
  @ApiProblem(409, 'The version has no steady state, or the analysis is not done')
  @ApiProblem(422, 'The project has no such analysis or channel, or it measures something else')
  compare(@Param('id') id: string, @Query() query: StudyComparisonQueryDto) {
    return this.comparisons.compare(id, query);
  }
}
