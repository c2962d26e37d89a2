import {
  Inject,
  Module,
  type MiddlewareConsumer,
  type NestModule,
  type OnModuleDestroy,
} from '@nestjs/common';
import type pg from 'pg';
import { AccessModule } from '../access/access.module.js';
import { AppConfig } from '../config/app-config.js';
import { POOL } from '../database/database.tokens.js';
import { MailsModule } from '../mails/mails.module.js';
import { AccessKeysController } from './access-keys.controller.js';
import { AccessKeysRepository } from './access-keys.repository.js';
import { AccessKeysService } from './access-keys.service.js';
import { AccountSessions } from './account-sessions.js';
import { AccountsRepository } from './accounts.repository.js';
import { AuthController } from './auth.controller.js';
import { AuthService } from './auth.service.js';
import { PasswordHasher } from './password-hasher.js';
import { PasswordResetsController } from './recovery/password-resets.controller.js';
import { PasswordResetsService } from './recovery/password-resets.service.js';
import { ResetRequestsModule } from './recovery/reset-requests.module.js';
import { SignInLimits } from './sign-in-limits.js';
import { makeSessionStore, sessionMiddleware } from './session.middleware.js';

@Module({
  imports: [AccessModule, MailsModule, ResetRequestsModule],
  controllers: [AuthController, AccessKeysController, PasswordResetsController],
  providers: [
    AuthService,
    AccountsRepository,
    AccountSessions,
    PasswordHasher,
    SignInLimits,
    AccessKeysService,
    AccessKeysRepository,
    PasswordResetsService,
  ],
  exports: [AccountSessions, PasswordHasher],
})
export class AuthModule implements NestModule, OnModuleDestroy {
  private readonly store: ReturnType<typeof makeSessionStore>;

  constructor(
    private readonly config: AppConfig,
    @Inject(POOL) pool: pg.Pool,
  ) {
    this.store = makeSessionStore(pool);
  }

  configure(consumer: MiddlewareConsumer): void {
    consumer.apply(sessionMiddleware(this.config, this.store)).forRoutes('{*path}');
  }

  onModuleDestroy(): void {
    this.store.close();
  }
}
