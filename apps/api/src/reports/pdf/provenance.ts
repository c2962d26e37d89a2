import type { ImportOptions, LimitSet, ReportSection } from '@overtally/contracts';
import { drawFacts, type Fact } from './facts.js';
import { formatCount, formatGiven, formatMoment } from './format.js';
import type { Sheet } from './sheet.js';
import { confidenceName } from './words.js';

/** Where every figure of a section comes from, so that it can be computed again. */
export function drawProvenance(sheet: Sheet, section: ReportSection): void {
  sheet.heading('Provenance', 50);
  drawFacts(sheet, provenanceFacts(section));
}

const confidenceWords = ({ confidence, evidence }: LimitSet): string =>
  evidence === '' ? confidenceName(confidence) : `${confidenceName(confidence)}, evidence: ${evidence}`;

function provenanceFacts({ recording, analysis, verdict }: ReportSection): Fact[] {
  const { limitSet } = verdict;
  const edition = [limitSet.standard, limitSet.edition, limitSet.tableRef]
    .filter((part) => part !== '')
    .join(', ');
  const parameters = Object.entries(verdict.parameters);
  return [
    ['Source file', `${recording.file.name}, ${formatCount(recording.file.size)} bytes`],
    ['SHA-256 of the file', recording.file.sha256, true],
    ['Import options', importWords(recording.import)],
    ...Object.entries(recording.metadata).map(([name, value]): Fact => [`From the file: ${name}`, value]),
    ['Analysis', analysis.id, true],
    ['Engine version', analysis.engineVersion ?? '–', true],
    ['Finished', formatMoment(analysis.finishedAt)],
    ['Verdict', verdict.id, true],
    ['Judged by', `${verdict.author.name}, ${formatMoment(verdict.createdAt)}`],
    ['Limit set', `${limitSet.title} (${limitSet.id}, version ${limitSet.version})`],
    ['Edition', edition === '' ? '–' : edition],
    ['Source of the limits', limitSet.source.join('; ') || '–'],
    ['Confidence in the limits', confidenceWords(limitSet)],
    ...limitSet.notes.map((note): Fact => ['Note to the limits', note]),
    ['Parameters', parameters.length === 0 ? 'none' : parameters.map(parameterWords).join(', ')],
  ];
}

const parameterUnits: Record<string, [name: string, unit: string]> = {
  powerW: ['active power', 'W'],
  powerFactor: ['power factor', ''],
  iscOverIl: ['Isc/IL', ''],
  ilA: ['IL', 'A'],
  rsce: ['Rsce', ''],
  irefA: ['Iref', 'A'],
  nominalV: ['nominal voltage', 'V'],
  expandedUncertaintyPercent: ['expanded uncertainty (k = 2)', '%'],
};

function parameterWords([key, value]: [string, number]): string {
  const [name, unit] = parameterUnits[key] ?? [key, ''];
  return `${name} ${formatGiven(value)}\u00a0${unit}`.trimEnd();
}

const delimiterNames = { ',': 'comma', ';': 'semicolon', '\t': 'tab', ' ': 'space', '|': 'bar' } as const;

/** A column by its name, or by its place counted from 1. */
const columnWords = (column: number | string): string =>
  typeof column === 'number' ? String(column + 1) : column;

function importWords(options: ImportOptions): string {
  const columns = options.channels?.map(
    ({ column, gain, offset, unit }) =>
      `column ${columnWords(column)}${gain === undefined ? '' : ` × ${formatGiven(gain)}`}${
        offset === undefined ? '' : ` + ${formatGiven(offset)}`
      }${unit ? ` in ${unit}` : ''}`,
  );
  const parts = [
    options.sampleRateHz !== undefined && `sample rate ${formatGiven(options.sampleRateHz)} Hz`,
    options.delimiter && `delimiter ${delimiterNames[options.delimiter]}`,
    options.decimal && `decimal ${options.decimal === ',' ? 'comma' : 'point'}`,
    options.headerRows !== undefined && `${options.headerRows} header rows`,
    options.timeColumn !== undefined &&
      (options.timeColumn === null ? 'no time column' : `time in column ${columnWords(options.timeColumn)}`),
    options.timeUnit && `time in ${options.timeUnit}`,
    columns?.join(', '),
  ].filter((part) => typeof part === 'string');
  return parts.length === 0 ? 'all detected' : `${parts.join('; ')}; the rest detected`;
}
