import {
  calibrationPageSchema,
  calibrationSchema,
  chainQuerySchema,
  createCalibrationSchema,
  createInstrumentSchema,
  instrumentPageSchema,
  instrumentQuerySchema,
  instrumentSchema,
  measuringChainListItemSchema,
  measuringChainPageSchema,
  pageQuerySchema,
  updateChainSchema,
  updateInstrumentSchema,
  writeChainSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class InstrumentDto extends createZodDto(instrumentSchema) {}
export class InstrumentPageDto extends createZodDto(instrumentPageSchema) {}
export class InstrumentQueryDto extends createZodDto(instrumentQuerySchema) {}
export class CreateInstrumentDto extends createZodDto(createInstrumentSchema) {}
export class UpdateInstrumentDto extends createZodDto(updateInstrumentSchema) {}

export class CalibrationDto extends createZodDto(calibrationSchema) {}
export class CalibrationPageDto extends createZodDto(calibrationPageSchema) {}
export class CalibrationQueryDto extends createZodDto(pageQuerySchema) {}
export class CreateCalibrationDto extends createZodDto(createCalibrationSchema) {}

export class ChainDto extends createZodDto(measuringChainListItemSchema) {}
export class ChainPageDto extends createZodDto(measuringChainPageSchema) {}
export class ChainQueryDto extends createZodDto(chainQuerySchema) {}
export class WriteChainDto extends createZodDto(writeChainSchema) {}
export class UpdateChainDto extends createZodDto(updateChainSchema) {}

const text = { type: 'string' };
const day = { type: 'string', format: 'date' };

/** A calibration as a form, with its certificate, for the OpenAPI document. */
export const calibrationForm = {
  type: 'object',
  required: ['calibratedOn', 'dueOn'],
  properties: {
    calibratedOn: day,
    dueOn: day,
    certificateNumber: text,
    calibratedBy: text,
    uncertainty: text,
    remark: text,
    certificate: { ...text, format: 'binary', description: 'PDF, PNG or JPEG, at most 20 MiB' },
  },
};
