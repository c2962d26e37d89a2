import type { WaveformFigures } from '../figures/waveform-figures.js';
import type { Flag } from '../types.js';
import { runsAt } from './runs-at.js';

const SAME_LEVEL = 1e-6;
const MIN_RUN = 3;

/**
 * Three or more successive samples at the highest (or lowest) value of the record, to 1e-6 of the peak-to-peak value, in
 * at least two separate crests. A crest that is flat merely because of fine sampling or a coarse converter step is
 * allowed the run that a sine of the same size would show.
 *
 * @param cycleSamples samples per cycle of the fundamental, null when none was found
 */
export function clippedFlag(
  samples: Float64Array,
  figures: WaveformFigures,
  sampleRateHz: number,
  cycleSamples: number | null,
): Flag | null {
  const span = figures.highest - figures.lowest;
  if (span === 0) return null;
  const tolerance = SAME_LEVEL * span;
  const natural =
    cycleSamples === null ? 0 : naturalRun(smallestStep(samples, span) + tolerance, span, cycleSamples);
  const minRun = Math.max(MIN_RUN, Math.ceil(1.5 * natural) + 1);
  const top = runsAt(samples, figures.highest - tolerance, Infinity, minRun);
  const bottom = runsAt(samples, -Infinity, figures.lowest + tolerance, minRun);
  if (top.count < 2 && bottom.count < 2) return null;
  const where = [
    top.count >= 2 ? `${top.count} crests at the top` : '',
    bottom.count >= 2 ? `${bottom.count} crests at the bottom` : '',
  ].filter((text) => text !== '');
  const firstS = Math.min(top.count >= 2 ? top.first : Infinity, bottom.count >= 2 ? bottom.first : Infinity);
  return {
    code: 'clipped',
    severity: 'error',
    message:
      `The waveform stays flat at its limit in ${where.join(' and ')}, first at ${(firstS / sampleRateHz).toPrecision(4)} s. ` +
      'Harmonics of a clipped record are wrong: choose a larger range and record again, ' +
      'or confirm that the signal itself has flat tops.',
  };
}

/** How many samples a sine of this span stays within `depth` of its crest: cos(θm/2) = 1 − depth/A. */
function naturalRun(depth: number, span: number, cycleSamples: number): number {
  const share = Math.min(1, (2 * depth) / span);
  return share > 0.25 ? 0 : (cycleSamples / Math.PI) * Math.acos(1 - share);
}

/** The smallest change between successive samples: the converter step of a quantised record, nearly 0 otherwise. */
function smallestStep(samples: Float64Array, span: number): number {
  let step = span;
  for (let i = 1; i < samples.length; i++) {
    const change = Math.abs(samples[i]! - samples[i - 1]!);
    if (change > 1e-9 * span && change < step) step = change;
  }
  return step;
}
