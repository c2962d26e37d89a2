import { Body, Controller, Delete, Get, Header, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiProduces, ApiOkResponse, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { SignedInUser } from '../common/request.js';
import {
  CloneLimitSetDto,
  CreateLimitSetDto,
  LimitSetDto,
  LimitSetPageDto,
  LimitSetQueryDto,
  LimitTableQueryDto,
  UpdateLimitSetDto,
} from './dto/limit-set.dto.js';
import { LimitSetsService } from './limit-sets.service.js';

@ApiTags('limits')
@Controller()
export class LimitSetsController {
  constructor(private readonly limitSets: LimitSetsService) {}

  @Get('limit-sets')
  @RequirePermission('limit-set.list')
  @ZodResponse({ status: 200, type: LimitSetPageDto, description: 'Published sets, then custom ones' })
  @ApiProblem(404, 'No such project, or not one of the person who asks')
  list(@CurrentUser() user: SignedInUser, @Query() { projectId }: LimitSetQueryDto) {
    return this.limitSets.list(user, projectId);
  }

  @Get('limit-sets/:id')
  @RequirePermission('limit-set.list')
  @ZodResponse({ status: 200, type: LimitSetDto })
  @ApiProblem(404, 'No such limit set, or not of a project of the person who asks')
  read(@CurrentUser() user: SignedInUser, @Param('id') id: string) {
    return this.limitSets.get(user, id);
  }

  @Get('limit-sets/:id/table.csv')
  @RequirePermission('limit-set.list')
  @Header('Content-Type', 'text/csv; charset=utf-8')
  @ApiProduces('text/csv')
  @ApiOkResponse({
    description: 'Limits as CSV that can be given as the `table` of a new set',
    schema: { type: 'string' },
  })
  @ApiProblem(404, 'No such limit set or row, or not of a project of the person who asks')
  table(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Query() { row }: LimitTableQueryDto) {
    return this.limitSets.table(user, id, row);
  }

  @Get('limit-sets/:id/versions')
  @RequirePermission('limit-set.read', { resource: 'limit-set' })
  @ZodResponse({
    status: 200,
    type: LimitSetPageDto,
    description: 'All versions of a custom set, newest first',
  })
  versions(@Param('id') id: string) {
    return this.limitSets.versions(id);
  }

  @Post('limit-sets/:id/versions')
  @RequirePermission('limit-set.write', { resource: 'limit-set' })
  @ZodResponse({ status: 201, type: LimitSetDto, description: 'The new version; earlier ones stay' })
  @ApiProblem(409, 'There is a newer version by now')
  @ApiProblem(422, 'An absolute limit without a unit, or a table that cannot be read')
  addVersion(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() input: CreateLimitSetDto) {
    return this.limitSets.addVersion(user, id, input);
  }

  @Patch('limit-sets/:id')
  @RequirePermission('limit-set.write', { resource: 'limit-set' })
  @ZodResponse({ status: 200, type: LimitSetDto, description: 'Retired or brought back, with all versions' })
  update(@Param('id') id: string, @Body() input: UpdateLimitSetDto) {
    return this.limitSets.update(id, input);
  }

  @Delete('limit-sets/:id')
  @HttpCode(204)
  @RequirePermission('limit-set.write', { resource: 'limit-set' })
  @ApiNoContentResponse({ description: 'This version is deleted; verdicts made with it keep their copy' })
  @ApiProblem(409, 'An issued report refers to it: retire it instead')
  delete(@Param('id') id: string) {
    return this.limitSets.delete(id);
  }

  @Get('projects/:id/limit-sets')
  @RequirePermission('limit-set.read', { resource: 'project' })
  @ZodResponse({
    status: 200,
    type: LimitSetPageDto,
    description: 'Published sets, then those of the project',
  })
  listOfProject(@Param('id') projectId: string) {
    return this.limitSets.listOfProject(projectId);
  }

  @Post('projects/:id/limit-sets')
  @RequirePermission('limit-set.write', { resource: 'project' })
  @ZodResponse({ status: 201, type: LimitSetDto })
  @ApiProblem(422, 'An absolute limit without a unit, or a table that cannot be read')
  create(
    @CurrentUser() user: SignedInUser,
    @Param('id') projectId: string,
    @Body() input: CreateLimitSetDto,
  ) {
    return this.limitSets.create(user, projectId, input);
  }

  @Post('projects/:id/limit-sets/clone')
  @RequirePermission('limit-set.write', { resource: 'project' })
  @ZodResponse({ status: 201, type: LimitSetDto, description: 'A set of the project with the same limits' })
  @ApiProblem(422, 'The project has no such limit set')
  clone(@CurrentUser() user: SignedInUser, @Param('id') projectId: string, @Body() input: CloneLimitSetDto) {
    return this.limitSets.clone(user, projectId, input);
  }
}
