import { AnalysisStopped } from './errors.js';
import { computePartInMemory } from './parts/run-part.js';
import { sourceOf } from './profiles/check-input.js';
import { createProgress } from './stages/progress.js';
import { recordStages } from './stages/record-stages.js';
import type { AnalyseOptions, RecordAnalysis, RecordInput } from './types.js';

/**
 * Analyses all channels of a record in memory: fundamental, harmonics, windows, powers, figures, quality flags and a
 * spectrum to draw. Pure and synchronous; the same input gives the same figures, also when `analyseSource` analyses it.
 *
 * - `mains`: rectangular windows of a whole number of cycles, back to back from the first sample (IEC 61000-4-7).
 * - `tone`: whole-record least squares and single-tone quality figures (IEEE 1241).
 * - `general`: whole-record least squares, averaged spectrum.
 *
 * Of records of more than 2^20 samples the orders are the mean phasors of the synchronous windows in place of the
 * whole-record least squares.
 *
 * @throws AnalysisInputError for input that cannot be analysed
 * @throws AnalysisStopped when `shouldStop` answers true
 */
export function analyseRecord(input: RecordInput, options: AnalyseOptions = {}): RecordAnalysis {
  const samples = new Map(input.channels.map((channel) => [channel.index, channel.samples]));
  const progress = createProgress(options.onProgress);
  const stages = recordStages(sourceOf(input));
  let step = stages.next();
  while (!step.done) {
    const parts = step.value;
    progress.begin(parts);
    const results = parts.map((part) => {
      if (options.shouldStop?.()) throw new AnalysisStopped();
      const result = computePartInMemory(part, samples.get(part.channel.index)!, {
        ...options,
        onProgress: (share) => progress.report(part, share),
      });
      progress.report(part, 1);
      return result;
    });
    step = stages.next(results);
  }
  progress.finish();
  return step.value;
}
