import { Module } from '@nestjs/common';
import { MailsModule } from '../../mails/mails.module.js';
import { PasswordResetsRepository } from './password-resets.repository.js';
import { RequestPasswordResetHandler } from './request-password-reset.handler.js';

/** The part of a password reset that a worker does. */
@Module({
  imports: [MailsModule],
  providers: [PasswordResetsRepository, RequestPasswordResetHandler],
  exports: [PasswordResetsRepository, RequestPasswordResetHandler],
})
export class ResetRequestsModule {}
