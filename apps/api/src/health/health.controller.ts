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
    return this.health.check([() => this.database()]);
  }

  private async database() {
    const indicator = this.indicators.check('database');
    try {
      await this.pool.query('select 1');
      return indicator.up();
    } catch (error) {
      return indicator.down({ message: error instanceof Error ? error.message : String(error) });
    }
  }
}
