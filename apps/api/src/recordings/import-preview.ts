import type { ImportPreview } from '@overtally/contracts';
import { previewRecording } from '@overtally/ingest';
import type { PreviewFields } from './dto/upload.dto.js';

/** What the reader makes of the beginning of a file under the given options. */
export async function importPreview(head: Uint8Array, fields: PreviewFields): Promise<ImportPreview> {
  const { layout, lines, rows, sampleRateHz, problem, needs, clockColumns } = await previewRecording(head, {
    fileName: fields.fileName,
    sizeBytes: fields.sizeBytes,
    options: fields.import ?? {},
  });
  return {
    format: layout.format,
    lines,
    columns: (layout.columns ?? []).map(({ index, name, unit, quantity }) => ({
      index,
      name,
      unit,
      quantity,
    })),
    rows,
    delimiter: layout.delimiter ?? null,
    decimal: layout.decimal ?? null,
    headerRows: layout.headerRows ?? null,
    timeColumn: layout.timeColumn ?? null,
    timeUnit: layout.timeUnit ?? null,
    sampleRateHz,
    confident: layout.confident && needs.length === 0,
    doubts: layout.doubts,
    problem,
    clockColumns,
    signals: [],
    readingRule: null,
    options: fields.import ?? {},
  };
}
