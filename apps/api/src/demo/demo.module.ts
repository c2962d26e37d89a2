import { Module } from '@nestjs/common';
import { AuthModule } from '../auth/auth.module.js';
import { EquipmentModule } from '../equipment/equipment.module.js';
import { InstrumentsModule } from '../instruments/instruments.module.js';
import { LaboratoryModule } from '../laboratory/laboratory.module.js';
import { LimitsModule } from '../limits/limits.module.js';
import { InvitationsModule } from '../invitations/invitations.module.js';
import { NotesModule } from '../notes/notes.module.js';
import { RecordingsModule } from '../recordings/recordings.module.js';
import { ReportsModule } from '../reports/reports.module.js';
import { StudiesModule } from '../studies/studies.module.js';
import { DemoAccounts } from './demo-accounts.js';
import { DemoBench } from './demo-bench.js';
import { DemoJudgements } from './demo-judgements.js';
import { DemoService } from './demo.service.js';

@Module({
  imports: [
    AuthModule,
    EquipmentModule,
    InstrumentsModule,
    LaboratoryModule,
    InvitationsModule,
    LimitsModule,
    NotesModule,
    RecordingsModule,
    ReportsModule,
    StudiesModule,
  ],
  providers: [DemoAccounts, DemoBench, DemoJudgements, DemoService],
})
export class DemoModule {}
