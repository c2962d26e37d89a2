import {
  accessKeyPageSchema,
  changePasswordSchema,
  createAccessKeySchema,
  createdAccessKeySchema,
  ownAccountSchema,
  forgotPasswordSchema,
  pageQuerySchema,
  resetPasswordSchema,
  sentResetLinkSchema,
  signInSchema,
  updateAccountSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class SignInDto extends createZodDto(signInSchema) {}
export class OwnAccountDto extends createZodDto(ownAccountSchema) {}
export class UpdateAccountDto extends createZodDto(updateAccountSchema) {}
export class ChangePasswordDto extends createZodDto(changePasswordSchema) {}

export class ForgotPasswordDto extends createZodDto(forgotPasswordSchema) {}
export class SentResetLinkDto extends createZodDto(sentResetLinkSchema) {}
export class ResetPasswordDto extends createZodDto(resetPasswordSchema) {}

export class AccessKeyPageDto extends createZodDto(accessKeyPageSchema) {}
export class AccessKeyQueryDto extends createZodDto(pageQuerySchema) {}
export class CreateAccessKeyDto extends createZodDto(createAccessKeySchema) {}
export class CreatedAccessKeyDto extends createZodDto(createdAccessKeySchema) {}
