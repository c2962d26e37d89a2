import { Module, type DynamicModule } from '@nestjs/common';
import { APP_FILTER, APP_INTERCEPTOR, APP_PIPE } from '@nestjs/core';
import { LoggerModule } from 'nestjs-pino';
import { ZodSerializerInterceptor } from 'nestjs-zod';
import { AccessModule } from './access/access.module.js';
import { AnalysesModule } from './analyses/analyses.module.js';
import { AuthModule } from './auth/auth.module.js';
import { loggerParams } from './common/logging.js';
import { ProblemFilter } from './common/problem.filter.js';
import { ValidationPipe } from './common/validation.pipe.js';
import { AppConfig } from './config/app-config.js';
import { ConfigModule } from './config/config.module.js';
import { DatabaseModule } from './database/database.module.js';
import { DemoModule } from './demo/demo.module.js';
import { EquipmentModule } from './equipment/equipment.module.js';
import { HealthModule } from './health/health.module.js';
import { HttpModule } from './http/http.module.js';
import { InstrumentsModule } from './instruments/instruments.module.js';
import { InvitationsModule } from './invitations/invitations.module.js';
import { JobsModule } from './jobs/jobs.module.js';
import { LaboratoryModule } from './laboratory/laboratory.module.js';
import { LimitsModule } from './limits/limits.module.js';
import { MailsModule } from './mails/mails.module.js';
import { NotesModule } from './notes/notes.module.js';
import { ProjectsModule } from './projects/projects.module.js';
import { ReadingRulesModule } from './reading-rules/reading-rules.module.js';
import { RecordingsModule } from './recordings/recordings.module.js';
import { UploadingModule } from './recordings/uploading/uploading.module.js';
import { ReportChecksModule } from './report-checks/report-checks.module.js';
import { ReportsModule } from './reports/reports.module.js';
import { StorageModule } from './storage/storage.module.js';
import { StudiesModule } from './studies/studies.module.js';
import { UsersModule } from './users/users.module.js';
import { WorkerModule } from './worker/worker.module.js';

/** The whole application. Order matters where modules bring middleware: logs, then sessions. */
@Module({})
export class AppModule {
  static with(config: AppConfig): DynamicModule {
    return {
      module: AppModule,
      imports: [
        LoggerModule.forRoot(loggerParams(config)),
        ConfigModule.with(config),
        DatabaseModule,
        AccessModule,
        AuthModule,
        UsersModule,
        ProjectsModule,
        StorageModule,
        JobsModule,
        MailsModule,
        LaboratoryModule,
        InstrumentsModule,
        EquipmentModule,
        InvitationsModule,
        ReadingRulesModule,
        RecordingsModule,
        UploadingModule,
        AnalysesModule,
        NotesModule,
        LimitsModule,
        StudiesModule,
        ReportsModule,
        ReportChecksModule,
        ...(config.worker === 'embedded' ? [WorkerModule] : []),
        ...(config.demo ? [DemoModule] : []),
        HealthModule,
        HttpModule,
      ],
      providers: [
        { provide: APP_FILTER, useClass: ProblemFilter },
        { provide: APP_PIPE, useClass: ValidationPipe },
        { provide: APP_INTERCEPTOR, useClass: ZodSerializerInterceptor },
      ],
    };
  }
}
