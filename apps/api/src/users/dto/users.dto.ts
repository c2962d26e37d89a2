import {
  createUserSchema,
  updateUserSchema,
  userPageSchema,
  userQuerySchema,
  userSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class UserDto extends createZodDto(userSchema) {}
export class UserPageDto extends createZodDto(userPageSchema) {}
export class UserQueryDto extends createZodDto(userQuerySchema) {}
export class CreateUserDto extends createZodDto(createUserSchema) {}
export class UpdateUserDto extends createZodDto(updateUserSchema) {}
