import { AnalysisStopped } from './errors.js';
import type { AnalyseSourceOptions, AnalysisPart, PartResult } from './parts/part-types.js';
import { createProgress, type Progress } from './stages/progress.js';
import { recordStages } from './stages/record-stages.js';
import type { RecordAnalysis, RecordSource } from './types.js';

/**
 * Analyses a record part by part, with the same figures as `analyseRecord`. `runPart` has the parts computed: by
 * `computePart` here, or in other threads that can read the samples; parts and their results are plain data. Apart from
 * the results the memory needed does not grow with the record. An error of a part ends the analysis with that error.
 *
 * @throws AnalysisInputError for input that cannot be analysed
 * @throws AnalysisStopped when `shouldStop`, asked before each part, answers true
 */
export async function analyseSource(
  source: RecordSource,
  options: AnalyseSourceOptions,
): Promise<RecordAnalysis> {
  const progress = createProgress(options.onProgress);
  const stages = recordStages(source);
  let step = stages.next();
  while (!step.done) {
    progress.begin(step.value);
    step = stages.next(await runBatch(step.value, progress, options));
  }
  progress.finish();
  return step.value;
}

/** Keeps up to `parallel` parts under way; the first error ends the batch once the parts under way have ended. */
async function runBatch(
  parts: readonly AnalysisPart[],
  progress: Progress,
  { runPart, parallel = 1, shouldStop }: AnalyseSourceOptions,
): Promise<PartResult[]> {
  const results = new Array<PartResult>(parts.length);
  const failures: unknown[] = [];
  let next = 0;

  async function work(): Promise<void> {
    while (next < parts.length && failures.length === 0) {
      const at = next++;
      const part = parts[at]!;
      try {
        if (shouldStop?.()) throw new AnalysisStopped();
        results[at] = await runPart(part, (share) => progress.report(part, share));
        progress.report(part, 1);
      } catch (error) {
        failures.push(error);
      }
    }
  }

  const workers = Math.max(1, Math.min(Math.floor(parallel), parts.length));
  await Promise.all(Array.from({ length: workers }, work));
  if (failures.length > 0) throw failures[0];
  return results;
}
