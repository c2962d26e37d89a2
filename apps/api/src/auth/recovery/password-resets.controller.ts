import { Body, Controller, HttpCode, Post, Req } from '@nestjs/common';
import { ApiNoContentResponse, ApiTags } from '@nestjs/swagger';
import type { SentResetLink } from '@overtally/contracts';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../../access/require-permission.decorator.js';
import { ApiProblem } from '../../common/api-problem.decorator.js';
import type { AppRequest } from '../../common/request.js';
import { ForgotPasswordDto, ResetPasswordDto, SentResetLinkDto } from '../dto/auth.dto.js';
import { resetLinkMinutes } from './request-password-reset.handler.js';
import { PasswordResetsService } from './password-resets.service.js';

@ApiTags('account')
@Controller('auth')
export class PasswordResetsController {
  constructor(private readonly resets: PasswordResetsService) {}

  @Post('forgot-password')
  @HttpCode(202)
  @RequirePermission('password.reset')
  @ZodResponse({ status: 202, type: SentResetLinkDto, description: 'The same for every address' })
  @ApiProblem(429, 'Too many requests; Retry-After tells the seconds to wait')
  async forgot(@Req() request: AppRequest, @Body() { email }: ForgotPasswordDto): Promise<SentResetLink> {
    await this.resets.request(email, request.ip ?? '');
    return { validForMinutes: resetLinkMinutes };
  }

  @Post('reset-password')
  @HttpCode(204)
  @RequirePermission('password.reset')
  @ApiNoContentResponse({ description: 'Set; sessions and access keys of the person have ended' })
  @ApiProblem(410, 'The link was used, has expired or never was')
  async reset(@Body() input: ResetPasswordDto): Promise<void> {
    await this.resets.reset(input);
  }
}
