import { describe, expect, it } from 'vitest';
import { createRealFftPlan } from '../fft/real-fft-plan.js';
import { windowSums } from '../windows/window-gains.js';
import { windowSamples } from '../windows/window-samples.js';
import { WINDOW_NAMES } from '../windows/window-terms.js';
import { windowTransform } from '../windows/window-transform.js';
import { interpolatePeak } from './interpolate-peak.js';

const LENGTH = 4096;

/** Line powers (A²/2 at the top of a tone) of a zero-padded windowed sine at `bins` cycles per record. */
function linePowers(window: Float64Array, bins: number, padded: number): Float64Array {
  const plan = createRealFftPlan(padded);
  const x = new Float64Array(padded);
  for (let n = 0; n < LENGTH; n++) x[n] = window[n]! * 3 * Math.cos((2 * Math.PI * bins * n) / LENGTH + 0.7);
  const [re, im] = [new Float64Array(plan.lineCount), new Float64Array(plan.lineCount)];
  plan.forward(x, re, im);
  return re.map((value, k) => (2 * (value ** 2 + im[k]! ** 2)) / windowSums(window).sum ** 2);
}

describe.each(WINDOW_NAMES)('interpolatePeak with %s', (name) => {
  // Closed form: a sine of amplitude 3 has the power 4.5 wherever it lies between two lines.
  it.each<[number, number]>([
    [700, LENGTH],
    [700.1, LENGTH],
    [699.75, LENGTH],
    [700.49, LENGTH],
    ...(name === 'flat-top' ? [] : [[700.3, 2 * LENGTH] as [number, number]]),
  ])('finds a tone at %d cycles per record', (bins, padded) => {
    const window = windowSamples(name, LENGTH);
    const power = linePowers(window, bins, padded);
    const k = power.indexOf(power.reduce((max, p) => Math.max(max, p)));
    const peak = interpolatePeak(power, k, windowTransform(name), LENGTH / padded);
    // Leakage of the negative frequency is what remains; of the rectangular window it falls with 1/distance.
    const digits = name === 'rectangular' ? 2 : 3;
    expect((peak.line * LENGTH) / padded).toBeCloseTo(bins, digits);
    expect(peak.power).toBeCloseTo(4.5, digits);
  });
});

describe('interpolatePeak', () => {
  // T. Grandke 1983: δ = (2α − 1)/(α + 1) with α = |X(k+1)|/|X(k)| for the Hann window.
  it.each([0.6, 0.75, 0.95])('is the closed form of Grandke for Hann at α = %d', (alpha) => {
    const power = Float64Array.from([0.01, 1, alpha ** 2]);
    const { line } = interpolatePeak(power, 1, windowTransform('hann'));
    expect(line - 1).toBeCloseTo((2 * alpha - 1) / (alpha + 1), 9);
  });
});
