import { Controller, Get, Inject } from '@nestjs/common';
import { ApiOkResponse, ApiTags } from '@nestjs/swagger';
import {
  HealthCheck,
  HealthCheckService,
  HealthIndicatorService,
  type HealthCheckResult,
} from '@nestjs/terminus';
import type pg from 'pg';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { POOL } from '../database/database.tokens.js';
import { ApiProblem } from '../common/api-problem.decorator.js';

/** A database that does not answer within this time counts as away. */
const TIMEOUT_MS = 3_000;

@ApiTags('system')
@Controller('health')
export class HealthController {
  constructor(
    private readonly health: HealthCheckService,
    private readonly indicators: HealthIndicatorService,
    @Inject(POOL) private readonly pool: pg.Pool,
  ) {}

  @Get()
  @RequirePermission('system.read')
  @HealthCheck({ swaggerDocumentation: false })
  @ApiOkResponse({
    description: 'All parts work',
    schema: { type: 'object', properties: { status: { type: 'string', enum: ['ok'] } } },
  })
  @ApiProblem(503, 'A part this service needs is not available')
  check(): Promise<HealthCheckResult> {
    const database = this.indicators.check('database');
    return this.health.check([
      () => database.attempt(async () => void (await this.pool.query('select 1'))).withTimeout(TIMEOUT_MS),
    ]);
  }
}
