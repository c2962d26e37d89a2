import { Module } from '@nestjs/common';
import { RecordingsModule } from '../recordings.module.js';
import { ResumableUploadsController } from '../resumable-uploads.controller.js';
import { UploadsController } from '../uploads.controller.js';
import { ArchivesService } from './archives/archives.service.js';
import { FinishUploadService } from './finish-upload.service.js';
import { ResumableUploadsService } from './resumable-uploads.service.js';
import { UploadSpool } from './upload-spool.js';

/** How files come in. Servers alone have this, workers do not: the spool belongs to the server that receives. */
@Module({
  imports: [RecordingsModule],
  controllers: [UploadsController, ResumableUploadsController],
  providers: [UploadSpool, ResumableUploadsService, FinishUploadService, ArchivesService],
})
export class UploadingModule {}
