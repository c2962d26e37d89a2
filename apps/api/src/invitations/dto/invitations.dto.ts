import {
  acceptedInvitationSchema,
  acceptInvitationSchema,
  createInvitationSchema,
  invitationPageSchema,
  invitationSchema,
  lookAtInvitationSchema,
  offeredInvitationSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class InvitationDto extends createZodDto(invitationSchema) {}
export class InvitationPageDto extends createZodDto(invitationPageSchema) {}
export class CreateInvitationDto extends createZodDto(createInvitationSchema) {}
export class LookAtInvitationDto extends createZodDto(lookAtInvitationSchema) {}
export class OfferedInvitationDto extends createZodDto(offeredInvitationSchema) {}
export class AcceptInvitationDto extends createZodDto(acceptInvitationSchema) {}
export class AcceptedInvitationDto extends createZodDto(acceptedInvitationSchema) {}
