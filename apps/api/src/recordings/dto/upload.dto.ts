import {
  finishUploadSchema,
  importOptionsSchema,
  readingRuleIdSchema,
  testConditionsSchema,
  unfinishedUploadListSchema,
  updateRecordingSchema,
  uploadLimitsSchema,
  uploadOutcomeSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';
import { z } from 'zod';
import { jsonText } from './json-text.js';

const bench = updateRecordingSchema.omit({ channels: true }).shape;

/** A form sends an empty text where nothing was filled in. */
const filled = <T extends z.ZodType>(schema: T) =>
  z.preprocess((value) => (value === '' ? undefined : value), schema);

/** An empty text counts as absent, the text null as none. */
const named = <T extends z.ZodType>(schema: T) =>
  z.preprocess((value) => (value === '' ? undefined : value === 'null' ? null : value), schema);

const readingRuleIdField = named(readingRuleIdSchema);

const uploadSchema = z.object({
  name: filled(bench.name),
  eut: filled(bench.eut),
  measuringChain: filled(bench.measuringChain),
  instrument: filled(bench.instrument),
  capturedAt: filled(bench.capturedAt),
  remark: filled(bench.remark),
  equipmentId: named(bench.equipmentId),
  operatingModeId: named(bench.operatingModeId),
  measuringChainId: named(bench.measuringChainId),
  conditions: jsonText(testConditionsSchema).optional(),
  import: jsonText(importOptionsSchema).optional(),
  readingRuleId: readingRuleIdField,
});

/** The text fields that go with an uploaded file. */
export class UploadDto extends createZodDto(uploadSchema) {}
export type UploadFields = z.output<typeof uploadSchema>;

/** The text fields that go with an archive; they are said of every capture in it. */
export class ArchiveDto extends createZodDto(uploadSchema.omit({ name: true })) {}

export class FinishUploadDto extends createZodDto(finishUploadSchema) {}
export class UploadOutcomeDto extends createZodDto(uploadOutcomeSchema) {}
export class UploadLimitsDto extends createZodDto(uploadLimitsSchema) {}
export class UnfinishedUploadListDto extends createZodDto(unfinishedUploadListSchema) {}

const previewSchema = z.object({
  fileName: z.string().min(1).max(255),
  sizeBytes: z.coerce.number().int().min(0),
  import: jsonText(importOptionsSchema).optional(),
  readingRuleId: readingRuleIdField,
});

/** The text fields that go with the beginning of a file. */
export class PreviewDto extends createZodDto(previewSchema) {}
export type PreviewFields = z.output<typeof previewSchema>;

const text = { type: 'string' } as const;

const readingRuleText = {
  ...text,
  description:
    'Id of the reading rule that the options come from, whose own are used without any; null for none. Absent: the ' +
    'rule that fits the file is used, unless options are stated',
};

/** The multipart bodies, for the OpenAPI document. */
export const uploadBody = {
  type: 'object',
  required: ['file'],
  properties: {
    file: {
      type: 'string',
      format: 'binary',
      description: 'The capture: CSV, WAV, NumPy .npy or COMTRADE .cff',
    },
    name: { ...text, description: 'File name without extension when absent' },
    eut: text,
    measuringChain: text,
    instrument: text,
    capturedAt: { ...text, format: 'date-time' },
    remark: text,
    equipmentId: { ...text, format: 'uuid', description: 'Equipment of the project' },
    operatingModeId: { ...text, format: 'uuid', description: 'Operating mode of that equipment' },
    measuringChainId: { ...text, format: 'uuid', description: 'Measuring chain of the laboratory' },
    conditions: { ...text, description: 'Test conditions as JSON, such as {"ambientTemperatureC": 23.5}' },
    import: { ...text, description: 'Import options as JSON; what is absent is detected' },
    readingRuleId: readingRuleText,
  },
};

const { name: _, ...archiveFields } = uploadBody.properties;

export const archiveBody = {
  type: 'object',
  required: ['file'],
  properties: {
    ...archiveFields,
    file: { type: 'string', format: 'binary', description: 'A ZIP archive of captures' },
  },
};

export const previewBody = {
  type: 'object',
  required: ['head', 'fileName', 'sizeBytes'],
  properties: {
    head: { type: 'string', format: 'binary', description: 'The first bytes of the file, up to 1 MiB' },
    fileName: text,
    sizeBytes: { type: 'integer', description: 'Size of the whole file' },
    import: { ...text, description: 'Import options as JSON' },
    readingRuleId: readingRuleText,
  },
};
