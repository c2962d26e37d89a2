import { Module } from '@nestjs/common';
import { AnalysesModule } from '../analyses/analyses.module.js';
import { LimitsModule } from '../limits/limits.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { StudyComputing } from './computing/study-computing.service.js';
import { ReportedStudies } from './reported-studies.service.js';
import { StudiesController } from './studies.controller.js';
import { StudiesRepository } from './studies.repository.js';
import { StudiesService } from './studies.service.js';
import { StudyComparisons } from './study-comparisons.service.js';

@Module({
  imports: [AnalysesModule, LimitsModule, RecordingsModule],
  controllers: [StudiesController],
  providers: [StudiesService, StudiesRepository, StudyComputing, StudyComparisons, ReportedStudies],
  exports: [StudiesService, ReportedStudies],
})
export class StudiesModule {}
