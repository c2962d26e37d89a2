import { Module } from '@nestjs/common';
import { ReportCheckLimits } from './report-check-limits.js';
import { ReportChecksController } from './report-checks.controller.js';
import { ReportChecksRepository } from './report-checks.repository.js';
import { ReportChecksService } from './report-checks.service.js';

@Module({
  controllers: [ReportChecksController],
  providers: [ReportChecksService, ReportChecksRepository, ReportCheckLimits],
})
export class ReportChecksModule {}
