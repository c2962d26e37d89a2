import { Module } from '@nestjs/common';
import { AnalysesModule } from '../analyses/analyses.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { WorkerService } from './worker.service.js';

@Module({ imports: [RecordingsModule, AnalysesModule], providers: [WorkerService] })
export class WorkerModule {}
