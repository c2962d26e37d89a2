import { Module } from '@nestjs/common';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { AnalysesController } from './analyses.controller.js';
import { AnalysesRepository } from './analyses.repository.js';
import { AnalysesService } from './analyses.service.js';
import { AnalyseRecordingHandler } from './computing/analyse-recording.handler.js';
import { SeriesController } from './series/series.controller.js';
import { SeriesService } from './series/series.service.js';

@Module({
  imports: [RecordingsModule],
  controllers: [AnalysesController, SeriesController],
  providers: [AnalysesService, AnalysesRepository, SeriesService, AnalyseRecordingHandler],
  exports: [AnalysesService, SeriesService, AnalyseRecordingHandler],
})
export class AnalysesModule {}
