import { Body, Controller, Delete, Get, Head, Options, Param, Patch, Post, Req, Res } from '@nestjs/common';
import { ApiBody, ApiConsumes, ApiHeader, ApiOperation, ApiResponse, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import type { Response } from 'express';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import type { AppRequest } from '../common/request.js';
import {
  FinishUploadDto,
  UnfinishedUploadListDto,
  UploadLimitsDto,
  UploadOutcomeDto,
} from './dto/upload.dto.js';
import { FinishUploadService } from './uploading/finish-upload.service.js';
import { goneSignal } from '../common/gone-signal.js';
import { ResumableUploadsService } from './uploading/resumable-uploads.service.js';
import { UploadLimitsService } from './uploading/upload-limits.service.js';
import { UploadSpool } from './uploading/upload-spool.js';

const inProject = { resource: 'project' } as const;
const text = { type: 'string' } as const;
const count = { type: 'integer', minimum: 0 } as const;
const described = (description: string, schema: typeof text | typeof count = text) => ({
  description,
  schema,
});
const offset = described('Bytes that have arrived', count);
const expires = described('When what arrived is dropped unless the upload is whole by then');
const version = ApiHeader({
  name: 'Tus-Resumable',
  required: true,
  schema: { type: 'string', enum: ['1.0.0'] },
});

/** Uploads that go on where they stopped. */
@ApiTags('uploads')
@Controller('projects/:id')
export class ResumableUploadsController {
  constructor(
    private readonly resumable: ResumableUploadsService,
    private readonly finishing: FinishUploadService,
    private readonly limits: UploadLimitsService,
    private readonly spool: UploadSpool,
  ) {}

  @Get('upload-limits')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({ summary: 'How large a file may be and what the project may still take' })
  @ZodResponse({ status: 200, type: UploadLimitsDto })
  limitsOf(@Param('id') projectId: string) {
    return this.limits.of(projectId);
  }

  @Get('uploads')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({ summary: 'Own uploads that began and have not become recordings, the newest first' })
  @ZodResponse({ status: 200, type: UnfinishedUploadListDto })
  async unfinished(@Param('id') projectId: string, @CurrentUser() { id: userId }: SignedInUser) {
    return { items: await this.spool.unfinished({ projectId, userId }), nextCursor: null };
  }

  @Options('uploads')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({ summary: 'What of tus 1.0 the server speaks' })
  @ApiResponse({
    status: 204,
    description: 'Told in headers',
    headers: {
      'Tus-Version': described('1.0.0'),
      'Tus-Extension': described('Extensions, with commas'),
      'Tus-Max-Size': described('Largest upload in bytes', count),
    },
  })
  capabilities(
    @Param('id') projectId: string,
    @CurrentUser() { id: userId }: SignedInUser,
    @Req() request: AppRequest,
    @Res() reply: Response,
  ): Promise<void> {
    return this.resumable.answer(request, reply, { projectId, userId });
  }

  @Post('uploads')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({ summary: 'Begin a resumable upload (tus 1.0, creation)' })
  @version
  @ApiHeader({ name: 'Upload-Length', required: true, description: 'Bytes of the file', schema: count })
  @ApiHeader({
    name: 'Upload-Metadata',
    required: false,
    description: 'filename and its value in Base64, with a space between',
    schema: text,
  })
  @ApiResponse({
    status: 201,
    description: 'Begun; the bytes go to Location',
    headers: {
      Location: described('Where the upload is, relative to the address of the request'),
      'Upload-Expires': expires,
    },
  })
  @ApiProblem(412, 'Tus-Resumable is not 1.0.0')
  @ApiProblem(413, 'The file is larger than the limit, or the project would hold more than its quota')
  @ApiProblem(507, 'The disk of the server has no room')
  create(
    @Param('id') projectId: string,
    @CurrentUser() { id: userId }: SignedInUser,
    @Req() request: AppRequest,
    @Res() reply: Response,
  ): Promise<void> {
    return this.resumable.answer(request, reply, { projectId, userId });
  }

  @Head('uploads/:uploadId')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({ summary: 'How much of an upload has arrived (tus 1.0)' })
  @version
  @ApiResponse({
    status: 200,
    description: 'Told in headers',
    headers: { 'Upload-Offset': offset, 'Upload-Length': described('Bytes of the file', count) },
  })
  @ApiProblem(410, 'What had arrived was dropped, or has become a recording')
  progress(
    @Param('id') projectId: string,
    @Param('uploadId') uploadId: string,
    @CurrentUser() { id: userId }: SignedInUser,
    @Req() request: AppRequest,
    @Res() reply: Response,
  ): Promise<void> {
    return this.resumable.answer(request, reply, { projectId, userId }, uploadId);
  }

  @Patch('uploads/:uploadId')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({ summary: 'Send the bytes of an upload, from where it stopped (tus 1.0)' })
  @version
  @ApiHeader({ name: 'Upload-Offset', required: true, description: 'Bytes that have arrived', schema: count })
  @ApiConsumes('application/offset+octet-stream')
  @ApiBody({ schema: { type: 'string', format: 'binary' } })
  @ApiResponse({
    status: 204,
    description: 'The bytes have arrived',
    headers: { 'Upload-Offset': offset, 'Upload-Expires': expires },
  })
  @ApiProblem(409, 'Upload-Offset is not what has arrived; ask for it')
  @ApiProblem(410, 'What had arrived was dropped, or has become a recording')
  @ApiProblem(412, 'Tus-Resumable is not 1.0.0')
  receive(
    @Param('id') projectId: string,
    @Param('uploadId') uploadId: string,
    @CurrentUser() { id: userId }: SignedInUser,
    @Req() request: AppRequest,
    @Res() reply: Response,
  ): Promise<void> {
    return this.resumable.answer(request, reply, { projectId, userId }, uploadId);
  }

  @Delete('uploads/:uploadId')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({ summary: 'Give an upload up (tus 1.0, termination)' })
  @version
  @ApiResponse({ status: 204, description: 'What had arrived was dropped' })
  @ApiProblem(412, 'Tus-Resumable is not 1.0.0')
  drop(
    @Param('id') projectId: string,
    @Param('uploadId') uploadId: string,
    @CurrentUser() { id: userId }: SignedInUser,
    @Req() request: AppRequest,
    @Res() reply: Response,
  ): Promise<void> {
    return this.resumable.answer(request, reply, { projectId, userId }, uploadId);
  }

  @Post('uploads/:uploadId/recordings')
  @RequirePermission('recording.upload', inProject)
  @ApiOperation({
    summary: 'Make a recording of an upload that is whole, or one of each capture in a ZIP archive',
  })
  @ZodResponse({ status: 202, type: UploadOutcomeDto })
  @ApiProblem(400, 'Options that are not valid')
  @ApiProblem(409, 'Bytes are missing')
  @ApiProblem(413, 'The project would hold more than its quota')
  @ApiProblem(
    422,
    'Another checksum, an archive that cannot be unpacked, or equipment, mode or chain do not fit',
  )
  finish(
    @Param('id') projectId: string,
    @Param('uploadId') uploadId: string,
    @CurrentUser() { id: userId }: SignedInUser,
    @Body() fields: FinishUploadDto,
    @Res({ passthrough: true }) reply: Response,
  ) {
    const signal = goneSignal(reply);
    return this.finishing.finish({ owner: { projectId, userId }, uploadId, fields, signal });
  }
}
