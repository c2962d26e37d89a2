import { Controller, Get, Param, Query } from '@nestjs/common';
import { ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../../access/require-permission.decorator.js';
import { ApiProblem } from '../../common/api-problem.decorator.js';
import { present } from '../../storage/missing-object.js';
import { SeriesDto, SeriesQueryDto } from '../dto/analysis.dto.js';
import { SeriesService } from './series.service.js';

@ApiTags('analyses')
@Controller('analyses/:id')
export class SeriesController {
  constructor(private readonly series: SeriesService) {}

  @Get('series')
  @RequirePermission('analysis.read', { resource: 'analysis' })
  @ApiOperation({ summary: 'A figure of a channel over time, thinned by the largest value' })
  @ZodResponse({ status: 200, type: SeriesDto })
  @ApiProblem(404, 'The channel, figure or order was not followed')
  @ApiProblem(409, 'The analysis is not done')
  figure(@Param('id') id: string, @Query() query: SeriesQueryDto) {
    return present(this.series.figure(id, query));
  }
}
