import { Controller, Get } from '@nestjs/common';
import { ApiOkResponse, ApiTags, type OpenAPIObject } from '@nestjs/swagger';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { OpenApi } from './openapi.js';

@ApiTags('system')
@Controller()
export class OpenApiController {
  constructor(private readonly openApi: OpenApi) {}

  @Get('openapi.json')
  @RequirePermission('system.read')
  @ApiOkResponse({ description: 'This document', schema: { type: 'object' } })
  read(): OpenAPIObject {
    return this.openApi.document;
  }
}
