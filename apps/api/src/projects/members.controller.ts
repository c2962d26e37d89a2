import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import {
  AddMemberDto,
  MemberDto,
  MemberPageDto,
  MemberParams,
  MemberQueryDto,
  UpdateMemberDto,
} from './dto/projects.dto.js';
import { MembersService } from './members.service.js';

@ApiTags('projects')
@Controller('projects/:id/members')
export class MembersController {
  constructor(private readonly members: MembersService) {}

  @Get()
  @RequirePermission('member.list', { resource: 'project' })
  @ZodResponse({ status: 200, type: MemberPageDto, description: 'Members by name' })
  list(@Param('id') id: string, @Query() query: MemberQueryDto) {
    return this.members.list(id, query);
  }

  @Post()
  @RequirePermission('member.manage', { resource: 'project' })
  @ZodResponse({ status: 201, type: MemberDto, description: 'The new member' })
  @ApiProblem(409, 'The person is a member already')
  @ApiProblem(422, 'No account has this e-mail address')
  add(@Param('id') id: string, @Body() input: AddMemberDto) {
    return this.members.add(id, input);
  }

  @Patch(':userId')
  @RequirePermission('member.manage', { resource: 'project' })
  @ZodResponse({ status: 200, type: MemberDto })
  @ApiProblem(409, 'No manager would be left')
  setRole(@Param() { id, userId }: MemberParams, @Body() input: UpdateMemberDto) {
    return this.members.setRole(id, userId, input);
  }

  @Delete(':userId')
  @HttpCode(204)
  @RequirePermission('member.manage', { resource: 'project' })
  @ApiNoContentResponse({ description: 'The person is no member any more' })
  @ApiProblem(409, 'No manager would be left')
  remove(@Param() { id, userId }: MemberParams): Promise<void> {
    return this.members.remove(id, userId);
  }
}
