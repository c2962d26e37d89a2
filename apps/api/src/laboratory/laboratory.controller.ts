import { Body, Controller, Get, Put } from '@nestjs/common';
import { ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { LaboratoryDto, UpdateLaboratoryDto } from './dto/laboratory.dto.js';
import { LaboratoryService } from './laboratory.service.js';

@ApiTags('laboratory')
@Controller('laboratory')
export class LaboratoryController {
  constructor(private readonly laboratory: LaboratoryService) {}

  @Get()
  @RequirePermission('laboratory.read')
  @ApiOperation({ summary: 'The laboratory that issues the reports; texts are empty until they are entered' })
  @ZodResponse({ status: 200, type: LaboratoryDto })
  get() {
    return this.laboratory.get();
  }

  @Put()
  @RequirePermission('laboratory.update')
  @ApiOperation({ summary: 'Say what reports name as their laboratory; issued ones stay as they are' })
  @ZodResponse({ status: 200, type: LaboratoryDto })
  put(@Body() input: UpdateLaboratoryDto) {
    return this.laboratory.put(input);
  }
}
