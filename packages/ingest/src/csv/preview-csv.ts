import { isUsableRate } from '../channels.js';
import { refuseHalfRecord } from '../comtrade/alone.js';
import { refuseKnownBinary } from '../known-binary.js';
import { PREVIEW_LINES, PREVIEW_ROWS, type PreviewHead, withProblem } from '../preview-problem.js';
import { catchRefusal } from '../refusal.js';
import type { ImportOptions, PreviewArguments, Problem } from '../types.js';
import { bareCell, cellKind, cellNumber } from './cell.js';
import { decodeText, guessEncoding } from './encoding.js';
import { splitCells, splitLines } from './lines.js';
import { type CsvPlan, describeLayout, planCsv, requireSampleRate } from './plan.js';
import { makeStampReader } from './stamp-reader.js';

function cellValue(cell: string, plan: CsvPlan): string | number | null {
  const { decimal } = plan.layout.dialect;
  const bare = bareCell(cell);
  if (bare === '') return null;
  return cellKind(bare, decimal) === 'number' ? cellNumber(bare, decimal) : bare;
}

/** Mean rate over the rows at hand; the rate of the whole file may differ in its last digits. */
function rateOfRows(rows: (string | number | null)[][], plan: CsvPlan): number | null {
  const { time } = plan.layout;
  if (time === null) return plan.layout.statedSampleRateHz;
  const { read } = makeStampReader();
  const cells = rows.map((row) => row[time.column]);
  const stamps = cells
    .map((cell) => (typeof cell === 'number' ? cell : read(String(cell))))
    .filter(Number.isFinite);
  const span = ((stamps.at(-1) ?? 0) - (stamps[0] ?? 0)) * time.secondsPerUnit;
  return span > 0 ? (stamps.length - 1) / span : null;
}

/** Says how a table would be read, from its beginning. */
export function previewCsv(head: Uint8Array, complete: boolean, args: PreviewArguments): PreviewHead {
  const options: ImportOptions = args.options ?? {};
  const { encoding, bomBytes } = guessEncoding(head);
  const text = decodeText(head.subarray(bomBytes), encoding);
  const lines = splitLines(text).slice(0, PREVIEW_LINES);
  return catchRefusal(
    () => {
      refuseKnownBinary(head, args.fileName);
      refuseHalfRecord(head.subarray(0, 4096), args.fileName, options);
      const plan = planCsv(text, encoding, complete, { fileName: args.fileName, options });
      const { bodyLine, delimiter } = plan.layout.dialect;
      const body = splitLines(text).slice(bodyLine, complete ? undefined : -1);
      const cells = body
        .map((line) => splitCells(line, delimiter))
        .filter((row) => row.some((cell) => cell !== ''));
      const rows = cells.map((row) => row.map((cell) => cellValue(cell, plan)));
      const problem = catchRefusal<Problem | null>(
        () => {
          requireSampleRate(plan, options);
          return null;
        },
        (found) => found,
      );
      const rate = options.sampleRateHz ?? rateOfRows(rows, plan);
      const sampleRateHz = rate !== null && isUsableRate(rate) ? rate : null;
      const needs = problem === null ? [] : ['sampleRateHz'];
      return {
        layout: describeLayout(plan),
        lines,
        rows: rows.slice(0, PREVIEW_ROWS),
        sampleRateHz,
        problem,
        needs,
        clockColumns: plan.layout.clockColumns,
      };
    },
    (problem) => withProblem('csv', lines, problem),
  );
}
