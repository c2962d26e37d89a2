import { Module } from '@nestjs/common';
import { AuthModule } from '../auth/auth.module.js';
import { LimitsModule } from '../limits/limits.module.js';
import { InvitationsModule } from '../invitations/invitations.module.js';
import { NotesModule } from '../notes/notes.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { ReportsModule } from '../reports/reports.module.js';
import { DemoAccounts } from './demo-accounts.js';
import { DemoJudgements } from './demo-judgements.js';
import { DemoService } from './demo.service.js';

@Module({
  imports: [AuthModule, InvitationsModule, LimitsModule, NotesModule, RecordingsModule, ReportsModule],
  providers: [DemoAccounts, DemoJudgements, DemoService],
})
export class DemoModule {}
