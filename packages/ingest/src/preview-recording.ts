import { isUsableRate } from './channels.js';
import { refuseHalfRecord } from './comtrade/alone.js';
import { isCff } from './comtrade/cff.js';
import { previewComtrade } from './comtrade/preview-comtrade.js';
import { bareCell, cellKind, cellNumber } from './csv/cell.js';
import { decodeText, guessEncoding } from './csv/encoding.js';
import { splitCells, splitLines } from './csv/lines.js';
import { type CsvPlan, describeLayout, planCsv, requireSampleRate } from './csv/plan.js';
import { makeStampReader } from './csv/stamp-reader.js';
import { refuseKnownBinary } from './known-binary.js';
import { isNpy } from './npy/header.js';
import { previewNpy } from './npy/preview-npy.js';
import { PREVIEW_LINES, PREVIEW_ROWS, refuseTooShort, withProblem } from './preview-problem.js';
import { catchRefusal } from './refusal.js';
import type { ImportOptions, PreviewArguments, PreviewOutcome, Problem } from './types.js';
import { isWav, readWavHeader } from './wav/header.js';
import { describeWav, wavChannels } from './wav/layout.js';
import { decoderOf } from './wav/samples.js';

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

function previewCsv(head: Uint8Array, complete: boolean, args: PreviewArguments): PreviewOutcome {
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
      };
    },
    (problem) => withProblem('csv', lines, problem),
  );
}

function previewWav(head: Uint8Array, complete: boolean, args: PreviewArguments): PreviewOutcome {
  return catchRefusal(
    () => {
      const header = readWavHeader(head, complete);
      if (typeof header === 'number') {
        refuseTooShort('the WAV file');
      }
      const { format, dataOffset, dataBytes } = header;
      wavChannels(header, args.options ?? {});
      const stride = format.bytesPerSample * format.channelCount;
      const available = Math.min(head.length - dataOffset, dataBytes ?? Infinity);
      const frames = Math.max(0, Math.min(PREVIEW_ROWS, Math.floor(available / stride)));
      const decode = decoderOf(format);
      const columns = Array.from({ length: format.channelCount }, (_, channel) => {
        const samples = new Float64Array(frames);
        decode(head, dataOffset + channel * format.bytesPerSample, stride, frames, samples);
        return samples;
      });
      const rows = Array.from({ length: frames }, (_, i) => columns.map((samples) => samples[i] as number));
      const sampleRateHz = args.options?.sampleRateHz ?? format.sampleRateHz;
      return { layout: describeWav(header), lines: [], rows, sampleRateHz, problem: null, needs: [] };
    },
    (problem) => withProblem('wav', [], problem),
  );
}

/**
 * Says how a file would be read, from its beginning (128 KiB tell as much as the reader itself looks at).
 * @param head the first bytes of the file
 * @param args `sizeBytes` is the size of the whole file; without it `head` is taken as the beginning of a longer one
 *   unless it is empty
 */
export function previewRecording(head: Uint8Array, args: PreviewArguments): PreviewOutcome {
  if (head.length === 0) {
    const message = `"${args.fileName}" is empty: it holds 0 bytes.`;
    return withProblem('csv', [], {
      code: 'empty-file',
      message,
      cure: 'Copy the file from the instrument again.',
    });
  }
  const complete = args.sizeBytes !== undefined && args.sizeBytes <= head.length;
  if (isWav(head)) return previewWav(head, complete, args);
  if (isNpy(head)) return previewNpy(head, complete, args);
  if (isCff(head)) return previewComtrade(head, complete, args);
  return previewCsv(head, complete, args);
}
