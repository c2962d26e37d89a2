import { Module } from '@nestjs/common';
import { AuthModule } from '../auth/auth.module.js';
import { MailsModule } from '../mails/mails.module.js';
import { ProjectsModule } from '../projects/projects.module.js';
import { UsersModule } from '../users/users.module.js';
import { AcceptingService } from './accepting.service.js';
import { InvitationsController } from './invitations.controller.js';
import { InvitationsRepository } from './invitations.repository.js';
import { InvitationsService } from './invitations.service.js';

@Module({
  imports: [AuthModule, MailsModule, ProjectsModule, UsersModule],
  controllers: [InvitationsController],
  providers: [InvitationsService, AcceptingService, InvitationsRepository],
  exports: [InvitationsService],
})
export class InvitationsModule {}
