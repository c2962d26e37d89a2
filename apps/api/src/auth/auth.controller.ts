import { Body, Controller, Get, HttpCode, Patch, Post, Req, Res } from '@nestjs/common';
import { ApiNoContentResponse, ApiTags } from '@nestjs/swagger';
import type { OwnAccount } from '@overtally/contracts';
import type { Response } from 'express';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { AppRequest, SignedInUser } from '../common/request.js';
import { AuthService } from './auth.service.js';
import { ChangePasswordDto, OwnAccountDto, SignInDto, UpdateAccountDto } from './dto/auth.dto.js';
import { beginSession, endSession } from './sessions.js';

@ApiTags('account')
@Controller('auth')
export class AuthController {
  constructor(private readonly auth: AuthService) {}

  @Post('sign-in')
  @RequirePermission('auth.sign-in')
  @ZodResponse({
    status: 200,
    type: OwnAccountDto,
    description: 'Signed in; the reply sets the session cookie',
  })
  @ApiProblem(401, 'E-mail or password is wrong')
  @ApiProblem(429, 'Too many failed attempts; Retry-After tells the seconds to wait')
  async signIn(@Req() request: AppRequest, @Body() input: SignInDto): Promise<OwnAccount> {
    const account = await this.auth.checkCredentials(input, request.ip ?? '');
    await beginSession(request, account.id);
    return this.auth.own(account);
  }

  @Post('sign-out')
  @HttpCode(204)
  @RequirePermission('account.own')
  @ApiNoContentResponse({ description: 'Signed out' })
  async signOut(@Req() request: AppRequest, @Res({ passthrough: true }) response: Response): Promise<void> {
    await endSession(request, response);
  }

  @Get('me')
  @RequirePermission('account.own')
  @ZodResponse({ status: 200, type: OwnAccountDto })
  me(@CurrentUser() user: SignedInUser): Promise<OwnAccount> {
    return this.auth.own(user);
  }

  @Patch('me')
  @RequirePermission('account.own')
  @ZodResponse({ status: 200, type: OwnAccountDto })
  rename(@CurrentUser() user: SignedInUser, @Body() input: UpdateAccountDto): Promise<OwnAccount> {
    return this.auth.rename(user, input);
  }

  @Post('change-password')
  @HttpCode(204)
  @RequirePermission('account.own')
  @ApiNoContentResponse({ description: 'Changed; all other sessions of the person have ended' })
  @ApiProblem(422, 'The current password is wrong')
  @ApiProblem(429, 'Too many failed attempts; Retry-After tells the seconds to wait')
  async changePassword(
    @Req() request: AppRequest,
    @CurrentUser() user: SignedInUser,
    @Body() input: ChangePasswordDto,
  ): Promise<void> {
    await this.auth.changePassword(user, input, request.ip ?? '');
    await beginSession(request, user.id);
  }
}
