import { convenientLength } from '../fft/radices.js';
import { createRealFftPlan } from '../fft/real-fft-plan.js';
import { windowSums } from '../windows/window-gains.js';
import { windowSamples } from '../windows/window-samples.js';
import { windowTransform } from '../windows/window-transform.js';
import { interpolatePeak } from '../peaks/interpolate-peak.js';
import { median } from '../figures/median.js';
import type { FrequencyBand, Spur } from './tone-result.js';

/** What is left of a record after tone and harmonics, by frequency. */
export interface ResidualSpectrum {
  stepHz: number;
  /** Power that a steady line at each place would have, DC to half the sample rate. */
  linePower: Float64Array;
  /** Share of the residual power from `fromHz` to `toHz`. */
  share(band: FrequencyBand): number;
  /** Median density squared, unit²/Hz. */
  densitySquared: number;
  /** The largest local maxima, largest first. */
  spurs(count: number): Spur[];
}

/** Median of an exponentially distributed power (one line of noise) relative to its mean. */
const MEDIAN_OF_NOISE = Math.LN2;
const MOST_MEDIAN_LINES = 2 ** 16;

/** Samples of the transform: as many as there are of a coherent record, otherwise a quick length at or above. */
export function residualLength(sampleCount: number, coherent: boolean): number {
  return coherent ? sampleCount : convenientLength(sampleCount);
}

/**
 * Spectrum of the residual of a tone. Of a coherent record it is the plain DFT of the whole record (IEEE 1241),
 * so that every line stands for itself; otherwise Hann-windowed and zero-padded to a quick length, lines interpolated by
 * the transform of the window (Grandke 1983).
 *
 * @param padded the residual followed by zeros, `residualLength` numbers in all; it is windowed in place
 */
export function residualSpectrum(
  padded: Float64Array,
  count: number,
  sampleRateHz: number,
  coherent: boolean,
): ResidualSpectrum {
  const length = padded.length;
  const stepHz = sampleRateHz / length;
  const windowName = coherent ? 'rectangular' : 'hann';
  const { sum, squares } = coherent ? { sum: count, squares: count } : windowInPlace(padded, count);
  const linePower = powerLines(padded);
  const scale = 1 / (sum * sum);
  for (let k = 0; k < linePower.length; k++) {
    linePower[k]! *= (k === 0 || 2 * k === length ? 1 : 2) * scale;
  }
  const transform = windowTransform(windowName);

  function spurs(limit: number): Spur[] {
    return localMaxima(linePower, limit).map((k) => {
      if (coherent || k === 0 || k === linePower.length - 1)
        return { frequencyHz: k * stepHz, power: linePower[k]! };
      const { line, power } = interpolatePeak(linePower, k, transform, count / length);
      return { frequencyHz: line * stepHz, power };
    });
  }

  return {
    stepHz,
    linePower,
    share: ({ fromHz, toHz }) => bandShare(linePower, stepHz, fromHz, toHz),
    densitySquared: ((medianLine(linePower) / MEDIAN_OF_NOISE) * sum * sum) / (squares * sampleRateHz),
    spurs,
  };
}

/** Returns Σw and Σw² of the window. */
function windowInPlace(samples: Float64Array, count: number): { sum: number; squares: number } {
  const window = windowSamples('hann', count);
  for (let n = 0; n < count; n++) samples[n]! *= window[n]!;
  return windowSums(window);
}

function powerLines(samples: Float64Array): Float64Array {
  const plan = createRealFftPlan(samples.length);
  const re = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  plan.forward(samples, re, im);
  for (let k = 0; k < re.length; k++) re[k] = re[k]! * re[k]! + im[k]! * im[k]!;
  return re;
}

/** Median of all lines, or of as many evenly chosen ones as tell it to half a percent. */
function medianLine(linePower: Float64Array): number {
  const stride = Math.ceil(linePower.length / MOST_MEDIAN_LINES);
  const chosen = new Float64Array(Math.ceil(linePower.length / stride));
  for (let i = 0; i < chosen.length; i++) chosen[i] = linePower[i * stride]!;
  return median(chosen);
}

/** Sharp edges: lines within the band count, lines outside do not; DC never does. */
function bandShare(linePower: Float64Array, stepHz: number, fromHz: number, toHz: number): number {
  let inside = 0;
  let all = 0;
  for (let k = 1; k < linePower.length; k++) {
    all += linePower[k]!;
    if (k * stepHz >= fromHz && k * stepHz <= toHz) inside += linePower[k]!;
  }
  return all > 0 ? inside / all : 0;
}

/** Indices of the largest lines that exceed their neighbours, DC left out, largest first. */
function localMaxima(linePower: Float64Array, limit: number): number[] {
  const found: number[] = [];
  let smallest = 0;
  for (let k = 1; k < linePower.length; k++) {
    const here = linePower[k]!;
    if (here <= smallest || here < linePower[k - 1]! || here < (linePower[k + 1] ?? 0)) continue;
    let at = found.length;
    while (at > 0 && linePower[found[at - 1]!]! < here) at--;
    found.splice(at, 0, k);
    if (found.length > limit) found.pop();
    if (found.length === limit) smallest = linePower[found[limit - 1]!]!;
  }
  return found;
}
