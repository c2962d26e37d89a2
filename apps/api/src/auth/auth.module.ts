import {
  Inject,
  Module,
  type MiddlewareConsumer,
  type NestModule,
  type OnModuleDestroy,
} from '@nestjs/common';
import type pg from 'pg';
import { AppConfig } from '../config/app-config.js';
import { POOL } from '../database/database.tokens.js';
import { makeSessionStore, sessionMiddleware } from './session.middleware.js';

@Module({})
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
