import {
  Body,
  Controller,
  Delete,
  Get,
  HttpCode,
  Param,
  Patch,
  Post,
  Query,
  Res,
  StreamableFile,
  UploadedFile,
  UseInterceptors,
} from '@nestjs/common';
import { FileInterceptor } from '@nestjs/platform-express';
import {
  ApiBody,
  ApiConsumes,
  ApiNoContentResponse,
  ApiOperation,
  ApiProduces,
  ApiResponse,
  ApiTags,
} from '@nestjs/swagger';
import { maxCertificateBytes } from '@overtally/contracts';
import type { Response } from 'express';
import multer from 'multer';
import { ZodResponse } from 'nestjs-zod';
import { RequirePermission } from '../access/require-permission.decorator.js';
import { ApiProblem } from '../common/api-problem.decorator.js';
import { CurrentUser, type SignedInUser } from '../common/current-user.decorator.js';
import { IdParam } from '../common/id-param.dto.js';
import { present } from '../storage/missing-object.js';
import { CalibrationsService } from './calibrations.service.js';
import {
  CalibrationDto,
  calibrationForm,
  CalibrationPageDto,
  CalibrationQueryDto,
  CreateCalibrationDto,
  CreateInstrumentDto,
  InstrumentDto,
  InstrumentPageDto,
  InstrumentQueryDto,
  UpdateInstrumentDto,
} from './dto/instrument.dto.js';
import { InstrumentsService } from './instruments.service.js';

/** A form of one file and its fields, held in memory until it has ended. */
const certificateForm = {
  storage: multer.memoryStorage(),
  defParamCharset: 'utf8',
  limits: { files: 1, fields: 10, parts: 12, fieldSize: 16 * 1024, fileSize: maxCertificateBytes },
};

@ApiTags('instruments')
@Controller()
export class InstrumentsController {
  constructor(
    private readonly instruments: InstrumentsService,
    private readonly calibrations: CalibrationsService,
  ) {}

  @Get('instruments')
  @RequirePermission('instrument.read')
  @ApiOperation({ summary: 'Instruments of the laboratory by name, with their calibration as of today' })
  @ZodResponse({ status: 200, type: InstrumentPageDto })
  list(@Query() query: InstrumentQueryDto) {
    return this.instruments.page(query);
  }

  @Post('instruments')
  @RequirePermission('instrument.write')
  @ApiOperation({ summary: 'Enter an instrument' })
  @ZodResponse({ status: 201, type: InstrumentDto })
  @ApiProblem(409, 'There is one of that manufacturer, model and serial number')
  @ApiProblem(422, 'The person responsible has no account')
  create(@CurrentUser() user: SignedInUser, @Body() input: CreateInstrumentDto) {
    return this.instruments.create(user.id, input);
  }

  @Get('instruments/:id')
  @RequirePermission('instrument.read')
  @ApiOperation({ summary: 'An instrument with its calibration as of today' })
  @ZodResponse({ status: 200, type: InstrumentDto })
  @ApiProblem(404, 'No such instrument')
  get(@Param() { id }: IdParam) {
    return this.instruments.get(id);
  }

  @Patch('instruments/:id')
  @RequirePermission('instrument.write')
  @ApiOperation({ summary: 'Change an instrument, or retire it' })
  @ZodResponse({ status: 200, type: InstrumentDto })
  @ApiProblem(404, 'No such instrument')
  @ApiProblem(409, 'There is another one of that manufacturer, model and serial number')
  @ApiProblem(422, 'The person responsible has no account')
  update(@Param() { id }: IdParam, @Body() change: UpdateInstrumentDto) {
    return this.instruments.update(id, change);
  }

  @Delete('instruments/:id')
  @HttpCode(204)
  @RequirePermission('instrument.write')
  @ApiNoContentResponse({ description: 'Deleted with its calibrations' })
  @ApiOperation({ summary: 'Delete an instrument that no measuring chain has' })
  @ApiProblem(404, 'No such instrument')
  @ApiProblem(409, 'A measuring chain or an issued report has it')
  async delete(@Param() { id }: IdParam): Promise<void> {
    await this.instruments.delete(id);
  }

  @Get('instruments/:id/calibrations')
  @RequirePermission('instrument.read')
  @ApiOperation({ summary: 'Calibrations of an instrument, the newest first' })
  @ZodResponse({ status: 200, type: CalibrationPageDto })
  @ApiProblem(404, 'No such instrument')
  listCalibrations(@Param() { id }: IdParam, @Query() query: CalibrationQueryDto) {
    return this.calibrations.page(id, query);
  }

  @Post('instruments/:id/calibrations')
  @UseInterceptors(FileInterceptor('certificate', certificateForm))
  @RequirePermission('instrument.write')
  @ApiOperation({ summary: 'Enter a calibration, as JSON or as a form with its certificate' })
  @ApiConsumes('multipart/form-data', 'application/json')
  @ApiBody({ schema: calibrationForm })
  @ZodResponse({ status: 201, type: CalibrationDto })
  @ApiProblem(404, 'No such instrument')
  @ApiProblem(413, 'The certificate is larger than 20 MiB')
  @ApiProblem(422, 'A day that has not come, or a certificate that is neither PDF nor PNG nor JPEG')
  createCalibration(
    @Param() { id }: IdParam,
    @CurrentUser() user: SignedInUser,
    @Body() input: CreateCalibrationDto,
    @UploadedFile() file: Express.Multer.File | undefined,
  ) {
    const certificate = file && { name: file.originalname, bytes: file.buffer };
    return this.calibrations.create(id, user.id, input, certificate);
  }

  @Get('calibrations/:id/certificate')
  @RequirePermission('instrument.read')
  @ApiOperation({ summary: 'The certificate of a calibration, byte for byte' })
  @ApiProduces('application/pdf', 'image/png', 'image/jpeg')
  @ApiResponse({ status: 200, schema: { type: 'string', format: 'binary' } })
  @ApiProblem(404, 'No such calibration, or none with a certificate')
  async certificate(
    @Param() { id }: IdParam,
    @Res({ passthrough: true }) response: Response,
  ): Promise<StreamableFile> {
    const { stream, name, size, sha256, contentType } = await present(this.calibrations.certificate(id));
    response.attachment(name).set({
      'X-Content-Type-Options': 'nosniff',
      'Cache-Control': 'private, no-cache',
      ETag: `"${sha256}"`,
    });
    return new StreamableFile(stream, { type: contentType, length: size });
  }

  @Delete('calibrations/:id')
  @HttpCode(204)
  @RequirePermission('instrument.write')
  @ApiNoContentResponse({ description: 'Deleted with its certificate' })
  @ApiOperation({ summary: 'Delete a calibration that was entered by mistake' })
  @ApiProblem(404, 'No such calibration')
  @ApiProblem(409, 'An issued report refers to it')
  async deleteCalibration(@Param() { id }: IdParam): Promise<void> {
    await this.calibrations.delete(id);
  }
}
