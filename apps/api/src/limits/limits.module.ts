import { Module } from '@nestjs/common';
import { AnalysesModule } from '../analyses/analyses.module.js';
import { LimitSetsController } from './limit-sets.controller.js';
import { LimitSetsRepository } from './limit-sets.repository.js';
import { LimitSetsService } from './limit-sets.service.js';
import { VerdictsController } from './verdicts.controller.js';
import { VerdictsRepository } from './verdicts.repository.js';
import { VerdictsService } from './verdicts.service.js';

@Module({
  imports: [AnalysesModule],
  controllers: [LimitSetsController, VerdictsController],
  providers: [LimitSetsService, LimitSetsRepository, VerdictsService, VerdictsRepository],
  exports: [LimitSetsService, VerdictsService],
})
export class LimitsModule {}
