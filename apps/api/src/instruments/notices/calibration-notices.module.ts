import { Module } from '@nestjs/common';
import { MailsModule } from '../../mails/mails.module.js';
import { InstrumentsModule } from '../instruments.module.js';
import { CalibrationNoticesHandler } from './calibration-notices.handler.js';

@Module({
  imports: [InstrumentsModule, MailsModule],
  providers: [CalibrationNoticesHandler],
  exports: [CalibrationNoticesHandler],
})
export class CalibrationNoticesModule {}
