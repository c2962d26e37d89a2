import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post } from '@nestjs/common';
import { ApiNoContentResponse, ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import {
  CreateReadingRuleDto,
  ReadingRuleDto,
  ReadingRuleListDto,
  UpdateReadingRuleDto,
} from './dto/reading-rule.dto.js';
import { ReadingRulesService } from './reading-rules.service.js';

@ApiTags('reading rules')
@Controller()
export class ReadingRulesController {
  constructor(private readonly rules: ReadingRulesService) {}

  @Get('projects/:id/reading-rules')
  @RequirePermission('reading-rule.read', { resource: 'project' })
  @ApiOperation({ summary: 'Reading rules of a project in the order they are tried' })
  @ZodResponse({ status: 200, type: ReadingRuleListDto })
  list(@Param('id') projectId: string) {
    return this.rules.list(projectId);
  }

  @Post('projects/:id/reading-rules')
  @RequirePermission('reading-rule.write', { resource: 'project' })
  @ApiOperation({ summary: 'Keep import options for the files they fit' })
  @ZodResponse({ status: 201, type: ReadingRuleDto })
  @ApiProblem(409, 'The project has a rule of that name, or as many rules as it may')
  create(
    @Param('id') projectId: string,
    @CurrentUser() user: SignedInUser,
    @Body() rule: CreateReadingRuleDto,
  ) {
    return this.rules.create(projectId, user.id, rule);
  }

  @Patch('reading-rules/:id')
  @RequirePermission('reading-rule.write', { resource: 'reading-rule' })
  @ApiOperation({ summary: 'Change a reading rule for the files that come' })
  @ZodResponse({ status: 200, type: ReadingRuleDto })
  @ApiProblem(409, 'The project has another rule of that name')
  update(@Param('id') id: string, @Body() change: UpdateReadingRuleDto) {
    return this.rules.update(id, change);
  }

  @Delete('reading-rules/:id')
  @HttpCode(204)
  @RequirePermission('reading-rule.write', { resource: 'reading-rule' })
  @ApiNoContentResponse({ description: 'Deleted; recordings that were read by it keep its name' })
  @ApiOperation({ summary: 'Delete a reading rule' })
  async delete(@Param('id') id: string): Promise<void> {
    await this.rules.delete(id);
  }
}
