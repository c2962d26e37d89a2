import { AnalysisStopped } from './errors.js';
import { analyseChannel } from './profiles/analyse-channel.js';
import { checkInput } from './profiles/check-input.js';
import { resolveSettings } from './profiles/resolve-settings.js';
import type { AnalyseOptions, RecordAnalysis, RecordInput } from './types.js';

/** Version of the engine; stored with every analysis. Changes whenever a figure could change. */
export const engineVersion = '0.1.0';

/**
 * Analyses all channels of a record: fundamental, harmonics, groups, figures, quality flags and a spectrum to draw.
 * Pure and synchronous; the same input gives the same figures.
 *
 * - `mains`: rectangular windows of a whole number of cycles, back to back from the first sample (IEC 61000-4-7).
 * - `tone`: whole-record least squares and single-tone quality figures (IEEE 1241).
 * - `general`: whole-record least squares, averaged spectrum.
 *
 * @throws AnalysisInputError for input that cannot be analysed
 * @throws AnalysisStopped when `shouldStop` answers true
 */
export function analyseRecord(input: RecordInput, options: AnalyseOptions = {}): RecordAnalysis {
  const settings = resolveSettings(input.settings);
  checkInput(input);
  const total = input.channels.length;
  const channels = input.channels.map((channel, done) =>
    analyseChannel(channel, input.sampleRateHz, settings, (fraction) => {
      if (options.shouldStop?.()) throw new AnalysisStopped();
      options.onProgress?.((done + fraction) / total);
    }),
  );
  return { engineVersion, settings, channels };
}
