import {
  importPreviewSchema,
  previewSignalSchema,
  readingRuleSchema,
  type ImportPreview,
  type PreviewSignal,
  type ReadingRule,
} from '@overtally/contracts';
import { sampleId } from './samples.js';

const moment = '2026-11-26T13:20:00Z';

/** Two cycles of 50 Hz at 230 V, read with all its digits. */
export const sampleSignal = (change: Partial<PreviewSignal> = {}): PreviewSignal =>
  previewSignalSchema.parse({
    ...{ column: 1, name: 'u', quantity: 'voltage', unit: 'V', startS: 0, stepS: 1e-4 },
    values: Array.from({ length: 400 }, (_, i) => 230 * Math.SQRT2 * Math.sin(2 * Math.PI * 50 * i * 1e-4)),
    ...{ rms: 230, peak: 325.269, fundamentalHz: 50 },
    ...change,
  });

/** A table of a time, a voltage and a second clock in ms. */
export const samplePreview = (change: Partial<ImportPreview> = {}): ImportPreview =>
  importPreviewSchema.parse({
    format: 'csv',
    lines: ['t;u;ms', '0,0000;0,000;0', '0,0001;10,217;0,1'],
    columns: [
      { index: 0, name: 't', unit: 's', quantity: 'other' },
      { index: 1, name: 'u', unit: 'V', quantity: 'voltage' },
      { index: 2, name: 'ms', unit: '', quantity: 'other' },
    ],
    rows: [
      [0, 0, 0],
      [0.0001, 10.217, 0.1],
    ],
    ...{ delimiter: ';', decimal: ',', headerRows: 1, timeColumn: 0, timeUnit: 's', sampleRateHz: 10_000 },
    ...{ confident: true, doubts: [], problem: null, clockColumns: [0, 2], signals: [sampleSignal()] },
    ...{ readingRule: null, options: {} },
    ...change,
  });

export const sampleRule = (change: Partial<ReadingRule> = {}): ReadingRule =>
  readingRuleSchema.parse({
    ...{
      id: sampleId(900),
      projectId: sampleId(10),
      name: 'Bench scope, CSV',
      fileNamePattern: 'bench-*.csv',
    },
    ...{ columnNames: ['t', 'u', 'ms'], options: { channels: [{ column: 1, probeRatio: 100 }] } },
    ...{ recordingCount: 3, createdBy: { id: sampleId(1), name: 'Mara Lind' }, createdAt: moment },
    updatedAt: moment,
    ...change,
  });
