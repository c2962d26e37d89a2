import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import {
  CreateEquipmentDto,
  EquipmentDto,
  EquipmentPageDto,
  EquipmentQueryDto,
  UpdateEquipmentDto,
} from './dto/equipment.dto.js';
import { EquipmentService } from './equipment.service.js';

@ApiTags('equipment')
@Controller()
export class EquipmentController {
  constructor(private readonly equipment: EquipmentService) {}

  @Get('projects/:id/equipment')
  @RequirePermission('equipment.read', { resource: 'project' })
  @ApiOperation({ summary: 'Equipment under test of a project, by name' })
  @ZodResponse({ status: 200, type: EquipmentPageDto })
  list(@Param('id') projectId: string, @Query() query: EquipmentQueryDto) {
    return this.equipment.page(projectId, query);
  }

  @Post('projects/:id/equipment')
  @RequirePermission('equipment.write', { resource: 'project' })
  @ApiOperation({ summary: 'Enter equipment with its ratings and operating modes' })
  @ZodResponse({ status: 201, type: EquipmentDto })
  create(
    @Param('id') projectId: string,
    @CurrentUser() user: SignedInUser,
    @Body() input: CreateEquipmentDto,
  ) {
    return this.equipment.create(projectId, user.id, input);
  }

  @Get('equipment/:id')
  @RequirePermission('equipment.read', { resource: 'equipment' })
  @ApiOperation({ summary: 'Equipment with its operating modes' })
  @ZodResponse({ status: 200, type: EquipmentDto })
  get(@Param('id') id: string) {
    return this.equipment.get(id);
  }

  @Patch('equipment/:id')
  @RequirePermission('equipment.write', { resource: 'equipment' })
  @ApiOperation({ summary: 'Change equipment; operating modes that are named replace those it has' })
  @ZodResponse({ status: 200, type: EquipmentDto })
  @ApiProblem(409, 'A mode that is left out is used by a recording')
  @ApiProblem(422, 'A mode is none of this equipment')
  update(@Param('id') id: string, @Body() change: UpdateEquipmentDto) {
    return this.equipment.update(id, change);
  }

  @Delete('equipment/:id')
  @HttpCode(204)
  @RequirePermission('equipment.write', { resource: 'equipment' })
  @ApiNoContentResponse({ description: 'Deleted' })
  @ApiOperation({ summary: 'Delete equipment that no recording names' })
  @ApiProblem(409, 'Recordings name it, or an issued report does')
  async delete(@Param('id') id: string): Promise<void> {
    await this.equipment.delete(id);
  }
}
