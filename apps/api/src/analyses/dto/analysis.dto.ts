import {
  analysisPageSchema,
  analysisSchema,
  createAnalysisSchema,
  pageQuerySchema,
  seriesQuerySchema,
  seriesSchema,
  seriesTableQuerySchema,
  spectrumQuerySchema,
  spectrumSchema,
} from '@overtally/contracts';
import { createZodDto } from 'nestjs-zod';

export class AnalysisDto extends createZodDto(analysisSchema) {}
export class AnalysisPageDto extends createZodDto(analysisPageSchema) {}
export class AnalysesQueryDto extends createZodDto(pageQuerySchema) {}
export class CreateAnalysisDto extends createZodDto(createAnalysisSchema) {}
export class SpectrumQueryDto extends createZodDto(spectrumQuerySchema) {}
export class SpectrumDto extends createZodDto(spectrumSchema) {}
export class SeriesQueryDto extends createZodDto(seriesQuerySchema) {}
export class SeriesDto extends createZodDto(seriesSchema) {}
export class SeriesTableQueryDto extends createZodDto(seriesTableQuerySchema) {}
