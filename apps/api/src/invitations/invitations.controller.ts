import { Body, Controller, Delete, Get, HttpCode, Param, Post, Query, Req } from '@nestjs/common';
import { ApiNoContentResponse, ApiTags } from '@nestjs/swagger';
import type { AcceptedInvitation } from '@overtally/contracts';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { beginSession } from '../auth/sessions.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser } from '../common/current-user.decorator.js';
import type { AppRequest, SignedInUser } from '../common/request.js';
import { PageQueryDto } from '../mails/dto/mails.dto.js';
import { AcceptingService } from './accepting.service.js';
import {
  AcceptedInvitationDto,
  AcceptInvitationDto,
  CreateInvitationDto,
  InvitationDto,
  InvitationPageDto,
  LookAtInvitationDto,
  OfferedInvitationDto,
} from './dto/invitations.dto.js';
import { InvitationsService } from './invitations.service.js';

@ApiTags('projects')
@Controller()
export class InvitationsController {
  constructor(
    private readonly invitations: InvitationsService,
    private readonly accepting: AcceptingService,
  ) {}

  @Get('projects/:id/invitations')
  @RequirePermission('member.manage', { resource: 'project' })
  @ZodResponse({ status: 200, type: InvitationPageDto, description: 'The newest first' })
  list(@Param('id') projectId: string, @Query() query: PageQueryDto) {
    return this.invitations.list(projectId, query);
  }

  @Post('projects/:id/invitations')
  @RequirePermission('member.manage', { resource: 'project' })
  @ZodResponse({ status: 201, type: InvitationDto, description: 'The invitation; its message is queued' })
  @ApiProblem(409, 'The person is a member already')
  invite(
    @CurrentUser() user: SignedInUser,
    @Param('id') projectId: string,
    @Body() input: CreateInvitationDto,
  ) {
    return this.invitations.invite(user, projectId, input);
  }

  @Delete('invitations/:id')
  @HttpCode(204)
  @RequirePermission('member.manage', { resource: 'invitation' })
  @ApiNoContentResponse({ description: 'Taken back; its link is dead' })
  @ApiProblem(409, 'The invitation was accepted')
  revoke(@CurrentUser() user: SignedInUser, @Param('id') id: string): Promise<void> {
    return this.invitations.revoke(user, id);
  }

  @Post('invitations/look')
  @HttpCode(200)
  @RequirePermission('invitation.answer')
  @ZodResponse({ status: 200, type: OfferedInvitationDto, description: 'What the link offers' })
  @ApiProblem(410, 'The invitation was answered, taken back, has expired or never was')
  look(@Body() { token }: LookAtInvitationDto) {
    return this.accepting.look(token);
  }

  @Post('invitations/accept')
  @HttpCode(200)
  @RequirePermission('invitation.answer')
  @ZodResponse({ status: 200, type: AcceptedInvitationDto, description: 'A member now, and signed in' })
  @ApiProblem(409, 'The address has an account, which is not signed in')
  @ApiProblem(403, 'The account is disabled')
  @ApiProblem(410, 'The invitation was answered, taken back, has expired or never was')
  async accept(@Req() request: AppRequest, @Body() input: AcceptInvitationDto): Promise<AcceptedInvitation> {
    const accepted = await this.accepting.accept(input, request.session.userId);
    await beginSession(request, accepted.account.id);
    return accepted;
  }
}
