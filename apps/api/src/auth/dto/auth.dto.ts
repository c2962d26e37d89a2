import { accountSchema, changePasswordSchema, signInSchema, updateAccountSchema } from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class SignInDto extends createZodDto(signInSchema) {}
export class AccountDto extends createZodDto(accountSchema) {}
export class UpdateAccountDto extends createZodDto(updateAccountSchema) {}
export class ChangePasswordDto extends createZodDto(changePasswordSchema) {}
