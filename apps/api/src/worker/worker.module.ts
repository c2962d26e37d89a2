import { Module } from '@nestjs/common';
import { AnalysesModule } from '../analyses/analyses.module.js';
import { CalibrationNoticesModule } from '../instruments/notices/calibration-notices.module.js';
import { MailsModule } from '../mails/mails.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { ResetRequestsModule } from '../auth/recovery/reset-requests.module.js';
import { ClearStorageHandler } from './clear-storage.handler.js';
import { WorkerService } from './worker.service.js';

@Module({
  imports: [RecordingsModule, AnalysesModule, MailsModule, ResetRequestsModule, CalibrationNoticesModule],
  providers: [WorkerService, ClearStorageHandler],
})
export class WorkerModule {}
