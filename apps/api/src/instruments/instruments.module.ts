import { Module } from '@nestjs/common';
import { CalibrationsService } from './calibrations.service.js';
import { ChainsController } from './chains.controller.js';
import { ChainsRepository } from './chains.repository.js';
import { ChainsService } from './chains.service.js';
import { InstrumentsController } from './instruments.controller.js';
import { InstrumentsRepository } from './instruments.repository.js';
import { InstrumentsService } from './instruments.service.js';

@Module({
  controllers: [InstrumentsController, ChainsController],
  providers: [
    InstrumentsService,
    CalibrationsService,
    ChainsService,
    InstrumentsRepository,
    ChainsRepository,
  ],
  exports: [InstrumentsService, CalibrationsService, ChainsService],
})
export class InstrumentsModule {}
