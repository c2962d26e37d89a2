import { Module } from '@nestjs/common';
import { AnalysesModule } from '../analyses/analyses.module.js';
import { EquipmentModule } from '../equipment/equipment.module.js';
import { InstrumentsModule } from '../instruments/instruments.module.js';
import { LaboratoryModule } from '../laboratory/laboratory.module.js';
import { LimitsModule } from '../limits/limits.module.js';
import { MailsModule } from '../mails/mails.module.js';
import { NotesModule } from '../notes/notes.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { StudiesModule } from '../studies/studies.module.js';
import { ReportContentService } from './report-content.service.js';
import { ReportIssueService } from './report-issue.service.js';
import { ReportDeliveriesController } from './report-deliveries.controller.js';
import { ReportNoticesRepository } from './report-notices.repository.js';
import { ReportNotices } from './report-notices.service.js';
import { ReportFilesController } from './report-files.controller.js';
import { ReportFiles } from './report-files.service.js';
import { ReportPictures } from './report-pictures.service.js';
import { ReportRevisionsService } from './report-revisions.service.js';
import { ReportStepsController } from './report-steps.controller.js';
import { ReportStepsService } from './report-steps.service.js';
import { ReportsController } from './reports.controller.js';
import { ReportsRepository } from './reports.repository.js';
import { ReportRendering } from './rendering/report-rendering.service.js';
import { ReportsService } from './reports.service.js';

@Module({
  imports: [
    AnalysesModule,
    EquipmentModule,
    InstrumentsModule,
    LaboratoryModule,
    LimitsModule,
    MailsModule,
    NotesModule,
    RecordingsModule,
    StudiesModule,
  ],
  controllers: [ReportDeliveriesController, ReportsController, ReportStepsController, ReportFilesController],
  providers: [
    ReportNotices,
    ReportNoticesRepository,
    ReportsService,
    ReportsRepository,
    ReportContentService,
    ReportStepsService,
    ReportIssueService,
    ReportRevisionsService,
    ReportRendering,
    ReportPictures,
    ReportFiles,
  ],
  exports: [ReportsService, ReportStepsService, ReportRendering],
})
export class ReportsModule {}
