import type { WaveformFigures } from '../figures/waveform-figures.js';
import type { Flag } from '../types.js';
import { flatCrests } from './flat-crests.js';

const SAME_LEVEL = 1e-6;
/** A flat stretch at this share of the span around zero is a rectifier's pause, not a limit. */
const ZERO_LEVEL = 1e-3;

/**
 * Three or more successive samples at the highest (or lowest) value of the record, to 1e-6 of the peak-to-peak value, in
 * at least two separate crests with sharp edges.
 */
export function clippedFlag(
  samples: Float64Array,
  { lowest, highest }: WaveformFigures,
  sampleRateHz: number,
): Flag | null {
  const span = highest - lowest;
  if (span === 0) return null;
  const tolerance = SAME_LEVEL * span;
  const step = smallestStep(samples, span);
  const crests = [lowest, highest].map((level) =>
    Math.abs(level) <= ZERO_LEVEL * span ? [] : flatCrests(samples, level, tolerance, step),
  );
  const [bottom, top] = crests.map((found) => (found.length >= 2 ? found : []));
  if (bottom!.length + top!.length === 0) return null;
  const where = [
    top!.length > 0 ? `${top!.length} crests at the top` : '',
    bottom!.length > 0 ? `${bottom!.length} crests at the bottom` : '',
  ].filter((text) => text !== '');
  const firstS = Math.min(...top!, ...bottom!) / sampleRateHz;
  return {
    code: 'clipped',
    severity: 'error',
    message:
      `The waveform stays flat at its limit in ${where.join(' and ')}, first at ${firstS.toPrecision(4)} s. ` +
      'Harmonics of a clipped record are wrong: choose a larger range and record again, ' +
      'or confirm that the signal itself has flat tops.',
  };
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
