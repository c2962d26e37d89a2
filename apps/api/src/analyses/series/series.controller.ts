import { Controller, Get, Param, Query, Res, StreamableFile } from '@nestjs/common';
import { ApiOperation, ApiProduces, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Response } from 'express';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../../access/require-permission.decorator.js';
import { ApiProblem } from '../../common/api-problem.decorator.js';
import { present } from '../../storage/missing-object.js';
import { SeriesDto, SeriesQueryDto, SeriesTableQueryDto } from '../dto/analysis.dto.js';
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

  @Get('series.csv')
  @RequirePermission('analysis.read', { resource: 'analysis' })
  @ApiOperation({ summary: 'A figure of a channel over time with all its orders, as a table' })
  @ApiProduces('text/csv')
  @ApiResponse({ status: 200, content: { 'text/csv': { schema: { type: 'string' } } } })
  @ApiProblem(404, 'The channel or figure was not followed')
  @ApiProblem(409, 'The analysis is not done')
  async table(
    @Param('id') id: string,
    @Query() query: SeriesTableQueryDto,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const stream = await present(this.series.table(id, query));
    response.attachment(`${query.figure}-channel-${query.channel}.csv`);
    return new StreamableFile(stream, { type: 'text/csv; charset=utf-8' });
  }
}
