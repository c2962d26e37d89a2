import { Controller, Get, Header, Param, Req } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import type { AppRequest } from '../common/request.js';
import { ReportCheckDto } from './dto/report-check.dto.js';
import { ReportChecksService } from './report-checks.service.js';

@ApiTags('reports')
@Controller('report-checks')
export class ReportChecksController {
  constructor(private readonly checks: ReportChecksService) {}

  @Get(':number/:code')
  @RequirePermission('report.check')
  @Header('Cache-Control', 'no-store')
  @ZodResponse({
    status: 200,
    type: ReportCheckDto,
    description: 'The issued revision that number and code are printed on',
  })
  @ApiProblem(404, 'No issued report has this number with this code')
  @ApiProblem(429, 'Too many checks from this address; Retry-After tells the seconds to wait')
  check(@Req() request: AppRequest, @Param('number') number: string, @Param('code') code: string) {
    return this.checks.check(number, code, request.ip ?? '');
  }
}
