import { Module } from '@nestjs/common';
import { MailsController } from './mails.controller.js';
import { MailsRepository } from './mails.repository.js';
import { MailsService } from './mails.service.js';
import { SecretLinks } from './secret-links.js';
import { MailTransport } from './sending/mail-transport.js';
import { OutgoingMails } from './sending/outgoing-mails.js';
import { SendMailHandler } from './sending/send-mail.handler.js';

@Module({
  controllers: [MailsController],
  providers: [MailsService, MailsRepository, SecretLinks, OutgoingMails, MailTransport, SendMailHandler],
  exports: [MailsService, SecretLinks, SendMailHandler],
})
export class MailsModule {}
