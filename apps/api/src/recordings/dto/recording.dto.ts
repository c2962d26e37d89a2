import {
  importPreviewSchema,
  readAgainSchema,
  recordingPageSchema,
  recordingQuerySchema,
  recordingSchema,
  updateRecordingSchema,
  waveformQuerySchema,
  waveformSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class RecordingDto extends createZodDto(recordingSchema) {}
export class RecordingPageDto extends createZodDto(recordingPageSchema) {}
export class RecordingQueryDto extends createZodDto(recordingQuerySchema) {}
export class UpdateRecordingDto extends createZodDto(updateRecordingSchema) {}
export class ReadAgainDto extends createZodDto(readAgainSchema) {}
export class ImportPreviewDto extends createZodDto(importPreviewSchema) {}
export class WaveformQueryDto extends createZodDto(waveformQuerySchema) {}
export class WaveformDto extends createZodDto(waveformSchema) {}
export class SamplesQueryDto extends createZodDto(waveformQuerySchema.pick({ channel: true })) {}
