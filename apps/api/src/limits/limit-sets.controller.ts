import { Body, Controller, Delete, Get, HttpCode, Param, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { SignedInUser } from '../common/request.js';
import { CreateLimitSetDto, LimitSetDto, LimitSetPageDto, LimitSetQueryDto } from './dto/limit-set.dto.js';
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

  @Delete('limit-sets/:id')
  @HttpCode(204)
  @RequirePermission('limit-set.write', { resource: 'limit-set' })
  @ApiNoContentResponse({ description: 'Deleted; verdicts made with it keep their copy' })
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
  @ApiProblem(422, 'An absolute limit without a unit')
  create(
    @CurrentUser() user: SignedInUser,
    @Param('id') projectId: string,
    @Body() input: CreateLimitSetDto,
  ) {
    return this.limitSets.create(user, projectId, input);
  }
}
