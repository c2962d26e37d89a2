import { Body, Controller, Get, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { SignedInUser } from '../common/request.js';
import {
  CreateProjectDto,
  ProjectDto,
  ProjectPageDto,
  ProjectQueryDto,
  UpdateProjectDto,
} from './dto/projects.dto.js';
import { ProjectsService } from './projects.service.js';

@ApiTags('projects')
@Controller('projects')
export class ProjectsController {
  constructor(private readonly projects: ProjectsService) {}

  @Get()
  @RequirePermission('project.list')
  @ZodResponse({ status: 200, type: ProjectPageDto, description: 'Own projects, the newest first' })
  list(@CurrentUser() user: SignedInUser, @Query() query: ProjectQueryDto) {
    return this.projects.list(user, query);
  }

  @Post()
  @RequirePermission('project.create')
  @ZodResponse({ status: 201, type: ProjectDto, description: 'The new project, managed by who made it' })
  @ApiProblem(422, 'The limit set to compare with is not a published one')
  create(@CurrentUser() user: SignedInUser, @Body() input: CreateProjectDto) {
    return this.projects.create(user, input);
  }

  @Get(':id')
  @RequirePermission('project.read', { resource: 'project' })
  @ZodResponse({ status: 200, type: ProjectDto })
  read(@CurrentUser() user: SignedInUser, @Param('id') id: string) {
    return this.projects.get(user, id);
  }

  @Patch(':id')
  @RequirePermission('project.update', { resource: 'project' })
  @ZodResponse({ status: 200, type: ProjectDto })
  @ApiProblem(422, 'The limit set to compare with is neither published nor one of the project')
  update(@CurrentUser() user: SignedInUser, @Param('id') id: string, @Body() input: UpdateProjectDto) {
    return this.projects.update(user, id, input);
  }
}
