import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import { present } from '../storage/missing-object.js';
import {
  ReadAgainDto,
  RecordingDto,
  RecordingPageDto,
  RecordingQueryDto,
  UpdateRecordingDto,
} from './dto/recording.dto.js';
import { RecordingsService } from './recordings.service.js';

@ApiTags('recordings')
@Controller()
export class RecordingsController {
  constructor(private readonly recordings: RecordingsService) {}

  @Get('projects/:id/recordings')
  @RequirePermission('recording.read', { resource: 'project' })
  @ApiOperation({ summary: 'Recordings of a project' })
  @ZodResponse({ status: 200, type: RecordingPageDto })
  list(@Param('id') projectId: string, @Query() query: RecordingQueryDto) {
    return this.recordings.page(projectId, query);
  }

  @Get('recordings/:id')
  @RequirePermission('recording.read', { resource: 'recording' })
  @ApiOperation({ summary: 'A recording, its state and the figures of its latest analysis' })
  @ZodResponse({ status: 200, type: RecordingDto })
  get(@Param('id') id: string) {
    return this.recordings.get(id);
  }

  @Patch('recordings/:id')
  @RequirePermission('recording.update', { resource: 'recording' })
  @ApiOperation({
    summary: 'Change bench data, or the channels; other scaling is followed by a new analysis',
  })
  @ZodResponse({ status: 200, type: RecordingDto })
  @ApiProblem(409, 'The channels are not known yet')
  @ApiProblem(422, 'Equipment, mode or chain that is not there, not of the project, or retired')
  update(@Param('id') id: string, @CurrentUser() user: SignedInUser, @Body() change: UpdateRecordingDto) {
    return this.recordings.update(id, user.id, change);
  }

  @Delete('recordings/:id')
  @HttpCode(204)
  @RequirePermission('recording.delete', { resource: 'recording' })
  @ApiNoContentResponse({ description: 'Deleted' })
  @ApiOperation({ summary: 'Delete a recording with all that was computed from it' })
  @ApiProblem(409, 'A report refers to it')
  async delete(@Param('id') id: string): Promise<void> {
    await this.recordings.delete(id);
  }

  @Post('recordings/:id/cancel-reading')
  @RequirePermission('recording.update', { resource: 'recording' })
  @ApiOperation({ summary: 'Call off a reading; what an earlier reading gave stands again' })
  @ZodResponse({ status: 202, type: RecordingDto })
  @ApiProblem(409, 'It is not being read')
  cancelReading(@Param('id') id: string, @CurrentUser() user: SignedInUser) {
    return this.recordings.cancelReading(id, user.id);
  }

  @Post('recordings/:id/read')
  @RequirePermission('recording.update', { resource: 'recording' })
  @ApiOperation({ summary: 'Read the source again under other import options; supersedes earlier analyses' })
  @ZodResponse({ status: 202, type: RecordingDto })
  @ApiProblem(400, 'Options that are not valid, or a reading rule of another project')
  @ApiProblem(409, 'It is being read')
  readAgain(@Param('id') id: string, @CurrentUser() user: SignedInUser, @Body() reading: ReadAgainDto) {
    return present(this.recordings.readAgain(id, user.id, reading));
  }
}
