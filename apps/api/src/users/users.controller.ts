import { Body, Controller, Get, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { IdParam } from '../common/id-param.dto.js';
import { CreateUserDto, UpdateUserDto, UserDto, UserPageDto, UserQueryDto } from './dto/users.dto.js';
import { UsersService } from './users.service.js';

@ApiTags('people')
@Controller('users')
export class UsersController {
  constructor(private readonly users: UsersService) {}

  @Get()
  @RequirePermission('user.manage')
  @ZodResponse({ status: 200, type: UserPageDto, description: 'People by e-mail address' })
  list(@Query() query: UserQueryDto) {
    return this.users.list(query);
  }

  @Post()
  @RequirePermission('user.manage')
  @ZodResponse({ status: 201, type: UserDto, description: 'The new account' })
  @ApiProblem(409, 'The e-mail address has an account already')
  create(@Body() input: CreateUserDto) {
    return this.users.create(input);
  }

  @Patch(':id')
  @RequirePermission('user.manage')
  @ZodResponse({ status: 200, type: UserDto })
  @ApiProblem(404, 'No such person')
  @ApiProblem(409, 'No administrator would be left')
  update(@Param() { id }: IdParam, @Body() input: UpdateUserDto) {
    return this.users.update(id, input);
  }
}
