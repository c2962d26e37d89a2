import {
  accessKeyPageSchema,
  changePasswordSchema,
  createAccessKeySchema,
  createdAccessKeySchema,
  ownAccountSchema,
  pageQuerySchema,
  signInSchema,
  updateAccountSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class SignInDto extends createZodDto(signInSchema) {}
export class OwnAccountDto extends createZodDto(ownAccountSchema) {}
export class UpdateAccountDto extends createZodDto(updateAccountSchema) {}
export class ChangePasswordDto extends createZodDto(changePasswordSchema) {}

export class AccessKeyPageDto extends createZodDto(accessKeyPageSchema) {}
export class AccessKeyQueryDto extends createZodDto(pageQuerySchema) {}
export class CreateAccessKeyDto extends createZodDto(createAccessKeySchema) {}
export class CreatedAccessKeyDto extends createZodDto(createdAccessKeySchema) {}
