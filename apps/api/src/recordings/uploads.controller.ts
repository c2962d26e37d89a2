import { Body, Controller, Param, Post, Res, UploadedFile, UseInterceptors } from '@nestjs/common';
import { FileInterceptor } from '@nestjs/platform-express';
import { ApiBody, ApiConsumes, ApiOperation, ApiTags } from '@nestjs/swagger';
import type { Response } from 'express';
import multer from 'multer';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import { problem } from '../common/problem.js';
import { ImportPreviewDto, RecordingDto } from './dto/recording.dto.js';
import {
  archiveBody,
  ArchiveDto,
  PreviewDto,
  previewBody,
  uploadBody,
  UploadDto,
  UploadOutcomeDto,
} from './dto/upload.dto.js';
import { PreviewsService } from './previewing/previews.service.js';
import { RecordingsService } from './recordings.service.js';
import { ArchiveInterceptor } from './uploading/archives/archive.interceptor.js';
import { ArchivesService } from './uploading/archives/archives.service.js';
import { formLimits } from './uploading/form-limits.js';
import { goneSignal } from '../common/gone-signal.js';
import type { StagedFile } from './uploading/staging-engine.js';
import { UploadInterceptor } from './uploading/upload.interceptor.js';

const maxHeadBytes = 1024 * 1024;

@ApiTags('recordings')
@Controller('projects/:id')
export class UploadsController {
  constructor(
    private readonly recordings: RecordingsService,
    private readonly previews: PreviewsService,
    private readonly archives: ArchivesService,
  ) {}

  @Post('recordings')
  @UseInterceptors(UploadInterceptor)
  @RequirePermission('recording.upload', { resource: 'project' })
  @ApiOperation({ summary: 'Upload a capture; it is read and analysed in the background' })
  @ApiConsumes('multipart/form-data')
  @ApiBody({ schema: uploadBody })
  @ZodResponse({ status: 202, type: RecordingDto })
  @ApiProblem(400, 'No file, a ZIP archive, or import options that are not valid')
  @ApiProblem(413, 'The file is larger than the limit, or than what the project may still take')
  @ApiProblem(422, 'Equipment, mode or chain that is not there, not of the project, or retired')
  @ApiProblem(507, 'The disk of the server has no room')
  upload(
    @Param('id') projectId: string,
    @CurrentUser() user: SignedInUser,
    @UploadedFile() file: StagedFile | undefined,
    @Body() fields: UploadDto,
  ) {
    if (file === undefined) throw missing('file', 'Send the capture as a part named file');
    const { originalname: fileName, staged } = file;
    return this.recordings.upload({ projectId, uploadedById: user.id, fileName, staged, fields });
  }

  @Post('archives')
  @UseInterceptors(ArchiveInterceptor)
  @RequirePermission('recording.upload', { resource: 'project' })
  @ApiOperation({ summary: 'Upload a ZIP archive; each capture in it becomes a recording' })
  @ApiConsumes('multipart/form-data')
  @ApiBody({ schema: archiveBody })
  @ZodResponse({ status: 202, type: UploadOutcomeDto })
  @ApiProblem(400, 'No file, no ZIP archive, or import options that are not valid')
  @ApiProblem(413, 'The archive is larger than the limit, or than what the project may still take')
  @ApiProblem(422, 'The archive cannot be read or holds nothing, or equipment, mode or chain do not fit')
  @ApiProblem(507, 'The disk of the server has no room')
  unpack(
    @Param('id') projectId: string,
    @CurrentUser() { id: userId }: SignedInUser,
    @UploadedFile() file: Express.Multer.File | undefined,
    @Body() fields: ArchiveDto,
    @Res({ passthrough: true }) reply: Response,
  ) {
    if (file === undefined) throw missing('file', 'Send the archive as a part named file');
    const signal = goneSignal(reply);
    return this.archives.unpackForm(file.path, { owner: { projectId, userId }, fields, signal });
  }

  @Post('import-preview')
  @UseInterceptors(
    FileInterceptor('head', {
      storage: multer.memoryStorage(),
      limits: { ...formLimits, fileSize: maxHeadBytes },
    }),
  )
  @RequirePermission('recording.upload', { resource: 'project' })
  @ApiOperation({ summary: 'How the beginning of a file would be read; nothing is kept' })
  @ApiConsumes('multipart/form-data')
  @ApiBody({ schema: previewBody })
  @ZodResponse({ status: 200, type: ImportPreviewDto })
  @ApiProblem(413, 'The beginning is longer than 1 MiB')
  preview(
    @Param('id') projectId: string,
    @UploadedFile() head: Express.Multer.File | undefined,
    @Body() fields: PreviewDto,
  ) {
    if (head === undefined) throw missing('head', 'Send the beginning of the file as a part named head');
    return this.previews.preview(projectId, head.buffer, fields);
  }
}

function missing(path: string, message: string) {
  return problem(400, 'invalid-request', message, [{ path, message }]);
}
