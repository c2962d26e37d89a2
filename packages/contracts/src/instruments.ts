import { z } from 'zod';
import { idSchema, pageOf, pageQuerySchema, personRefSchema, timestampSchema } from './common.js';
import { daySchema, retiredQuerySchema } from './equipment.js';

/** The laboratory that issues the reports, as their title page names it. */
export const laboratorySchema = z.object({
  name: z.string(),
  address: z.string(),
  contact: z.string(),
  accreditation: z.string().describe('What it says of its accreditation; empty: none'),
});
export type Laboratory = z.infer<typeof laboratorySchema>;

export const updateLaboratorySchema = z.strictObject({
  name: z.string().trim().max(160),
  address: z.string().trim().max(500),
  contact: z.string().trim().max(200),
  accreditation: z.string().trim().max(500),
});
export type UpdateLaboratory = z.infer<typeof updateLaboratorySchema>;

export const instrumentKindSchema = z.enum([
  'recorder',
  'voltage-transducer',
  'current-transducer',
  'signal-conditioner',
  'power-source',
  'other',
]);
export type InstrumentKind = z.infer<typeof instrumentKindSchema>;

/** Whether an instrument was in calibration at a moment; `none`: there is no calibration before it. */
export const calibrationStateSchema = z.enum(['valid', 'overdue', 'none']);
export type CalibrationState = z.infer<typeof calibrationStateSchema>;

/** Days ahead from which on calibration counts as due soon. */
export const calibrationNoticeDays = 30;
/** Largest file that is taken as a certificate. */
export const maxCertificateBytes = 20 * 1024 * 1024;

export const calibrationSchema = z.object({
  id: idSchema,
  instrumentId: idSchema,
  calibratedOn: daySchema,
  dueOn: daySchema,
  certificateNumber: z.string(),
  calibratedBy: z.string(),
  uncertainty: z.string().describe('As the certificate states it, with its coverage factor'),
  remark: z.string(),
  certificate: z.object({ name: z.string(), size: z.number().int(), sha256: z.string() }).nullable(),
  createdAt: timestampSchema,
});
export type Calibration = z.infer<typeof calibrationSchema>;
export const calibrationPageSchema = pageOf(calibrationSchema);

export const createCalibrationSchema = z
  .strictObject({
    calibratedOn: daySchema,
    dueOn: daySchema,
    certificateNumber: z.string().trim().max(120).default(''),
    calibratedBy: z.string().trim().max(160).default(''),
    uncertainty: z.string().trim().max(300).default(''),
    remark: z.string().trim().max(2000).default(''),
  })
  .refine(({ calibratedOn, dueOn }) => dueOn > calibratedOn, {
    message: 'Calibration is due after the day it was done',
    path: ['dueOn'],
  });
export type CreateCalibration = z.infer<typeof createCalibrationSchema>;

const instrumentFields = {
  kind: instrumentKindSchema,
  name: z.string().trim().min(1, 'Name the instrument').max(160),
  manufacturer: z.string().trim().max(160),
  model: z.string().trim().max(160),
  serialNumber: z.string().trim().min(1, 'Give the serial or inventory number').max(120),
  remark: z.string().trim().max(2000),
  responsibleId: idSchema.nullable().describe('Who is told when calibration is due; null: administrators'),
};

export const createInstrumentSchema = z.strictObject({
  ...instrumentFields,
  manufacturer: instrumentFields.manufacturer.default(''),
  model: instrumentFields.model.default(''),
  remark: instrumentFields.remark.default(''),
  responsibleId: instrumentFields.responsibleId.default(null),
});
export type CreateInstrument = z.infer<typeof createInstrumentSchema>;

export const updateInstrumentSchema = z.strictObject({ ...instrumentFields, retired: z.boolean() }).partial();
export type UpdateInstrument = z.infer<typeof updateInstrumentSchema>;

/** What reports and lists say of an instrument, with the calibration that counts at a moment. */
export const instrumentRefSchema = z.object({
  id: idSchema,
  kind: instrumentKindSchema,
  name: z.string(),
  manufacturer: z.string(),
  model: z.string(),
  serialNumber: z.string(),
  calibration: calibrationSchema.nullable(),
  calibrationState: calibrationStateSchema,
});
export type InstrumentRef = z.infer<typeof instrumentRefSchema>;

export const instrumentSchema = instrumentRefSchema.extend({
  remark: z.string(),
  responsible: personRefSchema.nullable(),
  retiredAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
});
export type Instrument = z.infer<typeof instrumentSchema>;
export const instrumentPageSchema = pageOf(instrumentSchema);

export const instrumentQuerySchema = pageQuerySchema.extend({
  q: z.string().trim().max(200).optional().describe('Looks in name, manufacturer, model, serial number'),
  state: z
    .enum(['valid', 'due-soon', 'overdue', 'none'])
    .optional()
    .describe(
      `Calibration as of today (UTC); due-soon: valid, but for ${calibrationNoticeDays} days at most`,
    ),
  retired: retiredQuerySchema,
});
export type InstrumentQuery = z.infer<typeof instrumentQuerySchema>;

export const writeChainSchema = z.strictObject({
  name: z.string().trim().min(1, 'Name the chain').max(160),
  description: z.string().trim().max(2000).default(''),
  instrumentIds: z
    .array(idSchema)
    .min(1, 'Choose at least one instrument')
    .max(20)
    .refine((ids) => new Set(ids).size === ids.length, { message: 'Each instrument may stand once' })
    .describe('From the quantity to the samples'),
});
export type WriteChain = z.infer<typeof writeChainSchema>;

export const updateChainSchema = writeChainSchema.extend({ retired: z.boolean() }).partial();
export type UpdateChain = z.infer<typeof updateChainSchema>;

/** A measuring chain with its instruments as they stood at a moment. */
export const measuringChainSchema = z.object({
  id: idSchema,
  name: z.string(),
  description: z.string(),
  instruments: z.array(instrumentRefSchema),
  calibrationState: calibrationStateSchema.describe('The worst of its instruments'),
});
export type MeasuringChain = z.infer<typeof measuringChainSchema>;

export const measuringChainListItemSchema = measuringChainSchema.extend({
  recordings: z.number().int().describe('Recordings made through it, of all projects'),
  retiredAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
});
export type MeasuringChainListItem = z.infer<typeof measuringChainListItemSchema>;
export const measuringChainPageSchema = pageOf(measuringChainListItemSchema);

export const chainQuerySchema = pageQuerySchema.extend({
  q: z.string().trim().max(200).optional().describe('Looks in name and description'),
  retired: retiredQuerySchema,
});
export type ChainQuery = z.infer<typeof chainQuerySchema>;

/** A measuring chain as a recording or a channel names it. */
export const chainRefSchema = z.object({
  id: idSchema,
  name: z.string(),
  calibrationState: calibrationStateSchema.describe(
    'The worst of its instruments when the recording was captured, or uploaded where that is not known',
  ),
  retiredAt: timestampSchema.nullable(),
});
export type ChainRef = z.infer<typeof chainRefSchema>;
