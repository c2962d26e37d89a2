import { Body, Controller, Get, Param, Post, Query } from '@nestjs/common';
import { ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import { present } from '../storage/missing-object.js';
import { AnalysesService } from './analyses.service.js';
import {
  AnalysesQueryDto,
  AnalysisDto,
  AnalysisPageDto,
  CreateAnalysisDto,
  SpectrumDto,
  SpectrumQueryDto,
} from './dto/analysis.dto.js';

@ApiTags('analyses')
@Controller()
export class AnalysesController {
  constructor(private readonly analyses: AnalysesService) {}

  @Get('recordings/:id/analyses')
  @RequirePermission('analysis.read', { resource: 'recording' })
  @ApiOperation({ summary: 'Analyses of a recording, the newest first' })
  @ZodResponse({ status: 200, type: AnalysisPageDto })
  list(@Param('id') recordingId: string, @Query() query: AnalysesQueryDto) {
    return this.analyses.page(recordingId, query);
  }

  @Post('recordings/:id/analyses')
  @RequirePermission('analysis.run', { resource: 'recording' })
  @ApiOperation({ summary: 'Analyse a recording; earlier analyses stand' })
  @ZodResponse({ status: 202, type: AnalysisDto })
  @ApiProblem(409, 'The recording has not been read')
  start(
    @Param('id') recordingId: string,
    @CurrentUser() user: SignedInUser,
    @Body() body: CreateAnalysisDto,
  ) {
    return this.analyses.start(recordingId, body.settings, user.id);
  }

  @Get('analyses/:id')
  @RequirePermission('analysis.read', { resource: 'analysis' })
  @ApiOperation({ summary: 'An analysis with all its figures' })
  @ZodResponse({ status: 200, type: AnalysisDto })
  get(@Param('id') id: string) {
    return this.analyses.get(id);
  }

  @Post('analyses/:id/cancel')
  @RequirePermission('analysis.run', { resource: 'analysis' })
  @ApiOperation({ summary: 'Call off an analysis; it ends as failed with the code cancelled' })
  @ZodResponse({ status: 202, type: AnalysisDto })
  @ApiProblem(409, 'It has ended already')
  cancel(@Param('id') id: string) {
    return this.analyses.cancel(id);
  }

  @Get('analyses/:id/spectrum')
  @RequirePermission('analysis.read', { resource: 'analysis' })
  @ApiOperation({ summary: 'One-sided rms amplitude spectrum of a channel, thinned by the largest line' })
  @ZodResponse({ status: 200, type: SpectrumDto })
  @ApiProblem(409, 'The analysis is not done, or too old to know its noise bandwidth')
  spectrum(@Param('id') id: string, @Query() query: SpectrumQueryDto) {
    return present(this.analyses.spectrum(id, query));
  }
}
