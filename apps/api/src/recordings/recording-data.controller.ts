import { Controller, Get, Headers, Param, Query, Req, Res, StreamableFile } from '@nestjs/common';
import { ApiOperation, ApiProduces, ApiResponse, ApiTags } from '@nestjs/swagger';
import type { Request, Response } from 'express';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { ProblemException } from '../common/problem.js';
import { present } from '../storage/missing-object.js';
import { Storage, type ByteRange } from '../storage/storage.js';
import { SamplesQueryDto, WaveformDto, WaveformQueryDto } from './dto/recording.dto.js';
import { recordingNumber } from './recording-number.js';
import { RecordingsRepository } from './recordings.repository.js';
import { WaveformService } from './waveform.service.js';

const binary = { schema: { type: 'string', format: 'binary' } } as const;

@ApiTags('recordings')
@Controller('recordings/:id')
export class RecordingDataController {
  constructor(
    private readonly waveforms: WaveformService,
    private readonly repository: RecordingsRepository,
    private readonly storage: Storage,
  ) {}

  @Get('waveform')
  @RequirePermission('recording.read', { resource: 'recording' })
  @ApiOperation({ summary: 'Part of a waveform, as samples or as minima and maxima' })
  @ZodResponse({ status: 200, type: WaveformDto })
  @ApiProblem(409, 'The recording is still being read')
  waveform(@Param('id') id: string, @Query() query: WaveformQueryDto) {
    return present(this.waveforms.part(id, query));
  }

  @Get('samples')
  @RequirePermission('recording.read', { resource: 'recording' })
  @ApiOperation({ summary: 'All samples of a channel in its unit, as an .npy array of float64' })
  @ApiProduces('application/octet-stream')
  @ApiResponse({ status: 200, content: { 'application/octet-stream': binary } })
  @ApiProblem(409, 'The recording is still being read')
  async samples(
    @Param('id') id: string,
    @Query() { channel }: SamplesQueryDto,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const { stream, size } = await present(this.waveforms.asNpy(id, channel));
    const recording = await this.repository.find(id);
    response.attachment(`${recordingNumber(recording?.number ?? 0)}-channel-${channel}.npy`);
    return new StreamableFile(stream, { type: 'application/octet-stream', length: size });
  }

  @Get('source')
  @RequirePermission('recording.read', { resource: 'recording' })
  @ApiOperation({ summary: 'The uploaded file, byte for byte; ranges are honoured' })
  @ApiProduces('application/octet-stream')
  @ApiResponse({ status: 200, content: { 'application/octet-stream': binary } })
  @ApiResponse({
    status: 206,
    description: 'The part asked for',
    content: { 'application/octet-stream': binary },
  })
  @ApiResponse({ status: 304, description: 'Unchanged' })
  async source(
    @Param('id') id: string,
    @Req() request: Request,
    @Headers('if-range') ifRange: string | undefined,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile | undefined> {
    const recording = (await this.repository.find(id))!;
    const entityTag = `"${recording.fileSha256}"`;
    if (request.get('if-none-match') === entityTag) {
      response.status(304).set({ 'Cache-Control': 'private, no-cache', ETag: entityTag });
      return undefined;
    }
    const size = recording.fileSize;
    const range = ifRange === undefined || ifRange === entityTag ? wantedRange(request, size) : undefined;
    const length = range === undefined ? size : range.end - range.start + 1;
    const stream = await present(this.storage.read(recording.sourceKey, range));
    // Set only now: they say nothing true of an answer that reports a fault.
    response.attachment(recording.fileName).set({
      // Not the type the name suggests: compressed on the way, a range would no longer be one of the file.
      'Content-Type': 'application/octet-stream',
      'Cache-Control': 'private, no-cache',
      'Accept-Ranges': 'bytes',
      ETag: entityTag,
    });
    if (range !== undefined) {
      response.status(206).set('Content-Range', `bytes ${range.start}-${range.end}/${size}`);
    }
    return new StreamableFile(stream, { type: 'application/octet-stream', length });
  }
}

/** The one range asked for; several at once, or another unit, are answered with the whole (RFC 9110, 14.2). */
function wantedRange(request: Request, size: number): ByteRange | undefined {
  const ranges = request.range(size);
  if (ranges === -1) {
    const detail = `The file has ${size} bytes; ask for a range within them`;
    throw new ProblemException(416, 'range-not-satisfiable', detail, undefined, {
      'Content-Range': `bytes */${size}`,
    });
  }
  if (ranges === undefined || ranges === -2 || ranges.type !== 'bytes' || ranges.length !== 1)
    return undefined;
  return ranges[0];
}
