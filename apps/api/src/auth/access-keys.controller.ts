import { Body, Controller, Delete, Get, HttpCode, Param, Post, Query, Req } from '@nestjs/common';
import { ApiNoContentResponse, ApiTags } from '@nestjs/swagger';
import type { CreatedAccessKey } from '@overtally/contracts';
import { ZodResponse } from 'nestjs-zod';
import { bearerSecret } from '../access/access-key.js';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import { IdParam } from '../common/id-param.dto.js';
import { problem } from '../common/problem.js';
import type { AppRequest, SignedInUser } from '../common/request.js';
import { AccessKeysService } from './access-keys.service.js';
import {
  AccessKeyPageDto,
  AccessKeyQueryDto,
  CreateAccessKeyDto,
  CreatedAccessKeyDto,
} from './dto/auth.dto.js';

@ApiTags('account')
@Controller('auth/keys')
export class AccessKeysController {
  constructor(private readonly keys: AccessKeysService) {}

  @Get()
  @RequirePermission('account.own')
  @ZodResponse({ status: 200, type: AccessKeyPageDto, description: 'Own access keys, the newest first' })
  list(@CurrentUser() { id }: SignedInUser, @Query() query: AccessKeyQueryDto) {
    return this.keys.list(id, query);
  }

  @Post()
  @RequirePermission('account.own')
  @ZodResponse({ status: 201, type: CreatedAccessKeyDto, description: 'The key with its secret, this once' })
  @ApiProblem(403, 'The request is signed by a key, which cannot make another')
  create(
    @Req() request: AppRequest,
    @CurrentUser() { id }: SignedInUser,
    @Body() input: CreateAccessKeyDto,
  ): Promise<CreatedAccessKey> {
    // One that could would outlive its own expiry and removal.
    if (bearerSecret(request) !== undefined) {
      throw problem(403, 'session-needed', 'A key cannot make another key; sign in to make one');
    }
    return this.keys.create(id, input);
  }

  @Delete(':id')
  @HttpCode(204)
  @RequirePermission('account.own')
  @ApiNoContentResponse({ description: 'Removed; requests with it are refused from now on' })
  @ApiProblem(404, 'No such key of the person who asks')
  delete(@CurrentUser() user: SignedInUser, @Param() { id }: IdParam): Promise<void> {
    return this.keys.delete(user.id, id);
  }
}
