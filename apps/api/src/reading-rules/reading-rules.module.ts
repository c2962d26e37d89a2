import { Module } from '@nestjs/common';
import { ReadingRulesController } from './reading-rules.controller.js';
import { ReadingRulesRepository } from './reading-rules.repository.js';
import { ReadingRulesService } from './reading-rules.service.js';

@Module({
  controllers: [ReadingRulesController],
  providers: [ReadingRulesService, ReadingRulesRepository],
  exports: [ReadingRulesService],
})
export class ReadingRulesModule {}
