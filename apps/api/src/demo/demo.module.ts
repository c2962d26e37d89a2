import { Module } from '@nestjs/common';
import { AuthModule } from '../auth/auth.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { DemoAccounts } from './demo-accounts.js';
import { DemoService } from './demo.service.js';

@Module({ imports: [AuthModule, RecordingsModule], providers: [DemoAccounts, DemoService] })
export class DemoModule {}
