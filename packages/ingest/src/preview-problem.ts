import { refuse } from './refusal.js';
import type { PreviewOutcome, Problem, RecordFormat } from './types.js';

/** Rows that a preview shows. */
export const PREVIEW_ROWS = 20;
/** Lines that a preview shows. */
export const PREVIEW_LINES = 30;

/** A preview without the samples of the beginning. */
export type PreviewHead = Omit<PreviewOutcome, 'signals' | 'headSamples'>;

/** A preview of what cannot be read as it is. */
export function withProblem(format: RecordFormat, lines: string[], problem: Problem): PreviewHead {
  const layout = { format, confident: false, doubts: [problem.message] };
  return { layout, lines, rows: [], sampleRateHz: null, problem, needs: [], clockColumns: [] };
}

/** Refuses a preview whose bytes end before the samples begin. `what` names the file, such as "the WAV file". */
export function refuseTooShort(what: string): never {
  refuse(
    'preview-too-short',
    `The beginning of ${what} does not reach to its samples.`,
    'Upload the file: it is read as a whole.',
  );
}
