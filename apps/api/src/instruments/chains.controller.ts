import { Body, Controller, Delete, Get, HttpCode, Param, Patch, Post, Query } from '@nestjs/common';
import { ApiNoContentResponse, ApiOperation, ApiTags } from '@nestjs/swagger';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import { IdParam } from '../common/id-param.dto.js';
import { ChainsService } from './chains.service.js';
import {
  ChainDto,
  ChainPageDto,
  ChainQueryDto,
  UpdateChainDto,
  WriteChainDto,
} from './dto/instrument.dto.js';

@ApiTags('measuring chains')
@Controller('measuring-chains')
export class ChainsController {
  constructor(private readonly chains: ChainsService) {}

  @Get()
  @RequirePermission('instrument.read')
  @ApiOperation({ summary: 'Measuring chains of the laboratory by name, with their calibration as of today' })
  @ZodResponse({ status: 200, type: ChainPageDto })
  list(@Query() query: ChainQueryDto) {
    return this.chains.page(query);
  }

  @Post()
  @RequirePermission('instrument.write')
  @ApiOperation({ summary: 'Put instruments together to a chain, from the quantity to the samples' })
  @ZodResponse({ status: 201, type: ChainDto })
  @ApiProblem(409, 'There is a chain of that name')
  @ApiProblem(422, 'An instrument is not known or retired')
  create(@CurrentUser() user: SignedInUser, @Body() input: WriteChainDto) {
    return this.chains.create(user.id, input);
  }

  @Get(':id')
  @RequirePermission('instrument.read')
  @ApiOperation({ summary: 'A measuring chain with its calibration as of today' })
  @ZodResponse({ status: 200, type: ChainDto })
  @ApiProblem(404, 'No such measuring chain')
  get(@Param() { id }: IdParam) {
    return this.chains.get(id);
  }

  @Patch(':id')
  @RequirePermission('instrument.write')
  @ApiOperation({ summary: 'Change a measuring chain; the instruments of one that recordings name stay' })
  @ZodResponse({ status: 200, type: ChainDto })
  @ApiProblem(404, 'No such measuring chain')
  @ApiProblem(409, 'There is another chain of that name, or recordings were made through this one')
  @ApiProblem(422, 'An instrument is not known or retired')
  update(@Param() { id }: IdParam, @Body() change: UpdateChainDto) {
    return this.chains.update(id, change);
  }

  @Delete(':id')
  @HttpCode(204)
  @RequirePermission('instrument.write')
  @ApiNoContentResponse({ description: 'Deleted' })
  @ApiOperation({ summary: 'Delete a measuring chain that no recording names' })
  @ApiProblem(404, 'No such measuring chain')
  @ApiProblem(409, 'Recordings or an issued report name it')
  async delete(@Param() { id }: IdParam): Promise<void> {
    await this.chains.delete(id);
  }
}
