import { Module } from '@nestjs/common';
import { AnalysisRunsService } from './analysis-runs.service.js';
import { EquipmentModule } from '../equipment/equipment.module.js';
import { InstrumentsModule } from '../instruments/instruments.module.js';
import { ReadingRulesModule } from '../reading-rules/reading-rules.module.js';
import { PreviewsService } from './previewing/previews.service.js';
import { ReadRecordingHandler } from './reading/read-recording.handler.js';
import { RecordingDataController } from './recording-data.controller.js';
import { RecordingViewsRepository } from './recording-views.repository.js';
import { RecordingsController } from './recordings.controller.js';
import { RecordingsRepository } from './recordings.repository.js';
import { RecordingsService } from './recordings.service.js';
import { UploadLimitsService } from './uploading/upload-limits.service.js';
import { WaveformService } from './waveform.service.js';

@Module({
  imports: [EquipmentModule, InstrumentsModule, ReadingRulesModule],
  controllers: [RecordingsController, RecordingDataController],
  providers: [
    RecordingsService,
    PreviewsService,
    RecordingsRepository,
    RecordingViewsRepository,
    AnalysisRunsService,
    WaveformService,
    UploadLimitsService,
    ReadRecordingHandler,
  ],
  exports: [
    RecordingsService,
    PreviewsService,
    UploadLimitsService,
    AnalysisRunsService,
    WaveformService,
    ReadRecordingHandler,
  ],
})
export class RecordingsModule {}
