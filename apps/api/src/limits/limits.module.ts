import { Module } from '@nestjs/common';
import { AnalysesModule } from '../analyses/analyses.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { LimitSetsController } from './limit-sets.controller.js';
import { LimitSetsRepository } from './limit-sets.repository.js';
import { LimitSetsService } from './limit-sets.service.js';
import { MeasurementsService } from './measurements.service.js';
import { VerdictSubjectsService } from './verdict-subjects.service.js';
import { VerdictsController } from './verdicts.controller.js';
import { VerdictsRepository } from './verdicts.repository.js';
import { VerdictsService } from './verdicts.service.js';

@Module({
  imports: [AnalysesModule, RecordingsModule],
  controllers: [LimitSetsController, VerdictsController],
  providers: [
    LimitSetsService,
    LimitSetsRepository,
    MeasurementsService,
    VerdictSubjectsService,
    VerdictsService,
    VerdictsRepository,
  ],
  exports: [LimitSetsService, VerdictsService],
})
export class LimitsModule {}
