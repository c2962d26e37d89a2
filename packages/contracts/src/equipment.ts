import { z } from 'zod';
import { idSchema, pageOf, pageQuerySchema, timestampSchema } from './common.js';

/** A day of the calendar, YYYY-MM-DD. */
export const daySchema = z.iso.date().describe('Day, YYYY-MM-DD');

/** What the rating plate of equipment says; what it does not say is absent. */
export const equipmentRatingsSchema = z.strictObject({
  voltageV: z.number().positive().max(1e6).optional().describe('Rated voltage in V'),
  currentA: z.number().positive().max(1e6).optional().describe('Rated current in A, per phase'),
  powerW: z.number().positive().max(1e9).optional().describe('Rated active power in W'),
  frequencyHz: z.number().positive().max(1e5).optional().describe('Rated frequency in Hz'),
  phases: z.union([z.literal(1), z.literal(2), z.literal(3)]).optional(),
  emissionClass: z
    .enum(['A', 'B', 'C', 'D'])
    .optional()
    .describe('Class that IEC 61000-3-2, clause 5, puts it in'),
});
export type EquipmentRatings = z.infer<typeof equipmentRatingsSchema>;

const operatingModeFields = {
  name: z.string().trim().min(1, 'Name the operating mode').max(120),
  description: z.string().trim().max(2000).default(''),
};

export const operatingModeSchema = z.object({ id: idSchema, name: z.string(), description: z.string() });
export type OperatingMode = z.infer<typeof operatingModeSchema>;

/** A mode as its equipment lists it; one that is retired is not offered any more. */
const listedModeSchema = operatingModeSchema.extend({
  recordings: z.number().int().describe('Recordings made in it'),
  retired: z.boolean(),
});
export type ListedMode = z.infer<typeof listedModeSchema>;

const equipmentFields = {
  name: z.string().trim().min(1, 'Name the equipment').max(160),
  manufacturer: z.string().trim().max(160).default(''),
  model: z.string().trim().max(160).default(''),
  serialNumber: z.string().trim().max(120).default(''),
  ratings: equipmentRatingsSchema.default({}),
  receivedOn: daySchema.nullable().default(null).describe('When the laboratory received it'),
  remark: z.string().trim().max(2000).default(''),
};

/** Modes without an id are new; those of the equipment that are not named are removed, unless recordings use them. */
const modesToWriteSchema = z
  .array(
    z.strictObject({ id: idSchema.optional(), ...operatingModeFields, retired: z.boolean().default(false) }),
  )
  .max(50)
  .refine((modes) => new Set(modes.map(({ name }) => name)).size === modes.length, {
    message: 'Each operating mode has a name of its own',
  });

export const createEquipmentSchema = z.strictObject({
  ...equipmentFields,
  operatingModes: modesToWriteSchema.default([]),
});
export type CreateEquipment = z.infer<typeof createEquipmentSchema>;

export const updateEquipmentSchema = z
  .strictObject({
    name: equipmentFields.name,
    manufacturer: z.string().trim().max(160),
    model: z.string().trim().max(160),
    serialNumber: z.string().trim().max(120),
    ratings: equipmentRatingsSchema,
    receivedOn: daySchema.nullable(),
    remark: z.string().trim().max(2000),
    operatingModes: modesToWriteSchema,
    retired: z.boolean(),
  })
  .partial();
export type UpdateEquipment = z.infer<typeof updateEquipmentSchema>;

/** Equipment under test. */
export const equipmentSchema = z.object({
  id: idSchema,
  projectId: idSchema,
  name: z.string(),
  manufacturer: z.string(),
  model: z.string(),
  serialNumber: z.string(),
  ratings: equipmentRatingsSchema,
  receivedOn: daySchema.nullable(),
  remark: z.string(),
  operatingModes: z.array(listedModeSchema).describe('In their order'),
  recordings: z.number().int().describe('Recordings of it'),
  retiredAt: timestampSchema.nullable(),
  createdAt: timestampSchema,
});
export type Equipment = z.infer<typeof equipmentSchema>;
export const equipmentPageSchema = pageOf(equipmentSchema);

/** Query texts are true or false in words. */
export const retiredQuerySchema = z
  .enum(['true', 'false'])
  .optional()
  .describe('true: retired ones only; false: none that are retired; absent: all');

export const equipmentQuerySchema = pageQuerySchema.extend({
  q: z.string().trim().max(200).optional().describe('Looks in name, manufacturer, model, serial number'),
  retired: retiredQuerySchema,
});
export type EquipmentQuery = z.infer<typeof equipmentQuerySchema>;

/** Equipment as a recording names it. */
export const equipmentRefSchema = equipmentSchema.pick({
  id: true,
  name: true,
  manufacturer: true,
  model: true,
  serialNumber: true,
  ratings: true,
  retiredAt: true,
});
export type EquipmentRef = z.infer<typeof equipmentRefSchema>;

/** Equipment in one line: name, manufacturer and model, serial number, as far as known. */
export function equipmentLine({
  name,
  manufacturer,
  model,
  serialNumber,
}: Pick<Equipment, 'name' | 'manufacturer' | 'model' | 'serialNumber'>): string {
  const kind = [manufacturer, model].filter((text) => text !== '').join(' ');
  const serial = serialNumber === '' ? '' : `serial no. ${serialNumber}`;
  return [name, kind, serial].filter((text) => text !== '').join(', ');
}

/** Conditions while a recording was made; what is not known is absent. */
export const testConditionsSchema = z.strictObject({
  ambientTemperatureC: z.number().min(-100).max(200).optional().describe('Ambient temperature in °C'),
  relativeHumidityPercent: z.number().min(0).max(100).optional(),
  supplyVoltageV: z.number().positive().max(1e6).optional().describe('Nominal test voltage in V'),
  supplyFrequencyHz: z.number().positive().max(1e5).optional().describe('Nominal supply frequency in Hz'),
  supply: z.string().trim().max(200).optional().describe('The supply, such as public supply or power source'),
  place: z.string().trim().max(200).optional().describe('Where it was done'),
  remark: z.string().trim().max(2000).optional(),
});
export type TestConditions = z.infer<typeof testConditionsSchema>;
