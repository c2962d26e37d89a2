import { Module } from '@nestjs/common';
import { APP_GUARD } from '@nestjs/core';
import { AccessGuard } from './access.guard.js';
import { AccessRepository } from './access.repository.js';

@Module({
  providers: [AccessRepository, { provide: APP_GUARD, useClass: AccessGuard }],
  exports: [AccessRepository],
})
export class AccessModule {}
