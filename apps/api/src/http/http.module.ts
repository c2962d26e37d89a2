import { Module } from '@nestjs/common';
import { OpenApiController } from './openapi.controller.js';
import { OpenApi } from './openapi.js';

@Module({ controllers: [OpenApiController], providers: [OpenApi] })
export class HttpModule {}
