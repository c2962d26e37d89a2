import type { ImportOptions, ImportPreview } from '@overtally/contracts';
import { previewRecording } from '@overtally/ingest';
import { signalFigures } from './signal-figures.js';

export interface PreviewTaskInput {
  /** The beginning of the file. */
  head: Uint8Array;
  fileName: string;
  /** Size of the whole file. */
  sizeBytes: number;
  options: ImportOptions;
}

export type PreviewTaskResult = Omit<ImportPreview, 'readingRule' | 'options'>;

/** What the reader makes of the beginning of a file under the given options. */
export async function previewTask({ head, ...file }: PreviewTaskInput): Promise<PreviewTaskResult> {
  const preview = await previewRecording(head, file);
  const { layout, lines, rows, sampleRateHz, problem, needs, clockColumns, signals, headSamples } = preview;
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
    signals: signals.map((signal, i) => ({
      ...signal,
      ...signalFigures(headSamples[i]!.samples, sampleRateHz),
    })),
  };
}
