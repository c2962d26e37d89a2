import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createWelch, welch, type WelchOptions } from './welch.js';

const RATE = 1000;
const HANN: WelchOptions = {
  window: 'hann',
  segmentLength: 256,
  overlapSamples: 128,
  detrend: 'mean',
  scaling: 'density',
};

function sine(length: number, cyclesPerSample: number, amplitude: number): Float64Array {
  return Float64Array.from(
    { length },
    (_, n) => amplitude * Math.cos(2 * Math.PI * cyclesPerSample * n + 0.3),
  );
}

describe('welch', () => {
  // Closed form: a sine of amplitude A on a line has the power A²/2 there whatever the window.
  it.each(['rectangular', 'hann', 'flat-top', 'nuttall'] as const)(
    'shows the power of a tone with %s',
    (window) => {
      const { power, stepHz } = welch(sine(4096, 32 / 256, 3), RATE, {
        ...HANN,
        window,
        scaling: 'spectrum',
      });
      expect(power[32]).toBeCloseTo(4.5, 9);
      expect(32 * stepHz).toBe(125);
    },
  );

  // Closed form: white noise of variance 1 has the one-sided density 2/fs; 255 averages leave about 1 % of it on the mean.
  it('shows the density of white noise', () => {
    const { power, segments } = welch(seededNoise(32_768, 5), RATE, HANN);
    const mean = power.slice(2, -2).reduce((sum, p) => sum + p, 0) / (power.length - 4);
    expect(segments).toBe(255);
    expect(mean / (2 / RATE)).toBeGreaterThan(0.97);
    expect(mean / (2 / RATE)).toBeLessThan(1.03);
  });

  it('relates density and spectrum by the noise bandwidth', () => {
    const x = seededNoise(2048, 6);
    const density = welch(x, RATE, HANN);
    const spectrum = welch(x, RATE, { ...HANN, scaling: 'spectrum' });
    expect(density.noiseBandwidthHz).toBeCloseTo((1.5 * RATE) / 256, 9);
    density.power.forEach((p, k) => expect(p * density.noiseBandwidthHz).toBeCloseTo(spectrum.power[k]!, 12));
  });

  // Closed form: with a rectangular window a constant c is c² on the DC line and nowhere else.
  it('keeps DC unless the mean is taken away', () => {
    const constant = new Float64Array(512).fill(2);
    const options = { ...HANN, window: 'rectangular', scaling: 'spectrum' } as const;
    expect(welch(constant, RATE, { ...options, detrend: 'none' }).power[0]).toBeCloseTo(4, 12);
    expect(welch(constant, RATE, options).power[0]).toBe(0);
  });

  it('takes a record shorter than a segment as one segment', () => {
    const { segments, stepHz } = welch(seededNoise(100, 8), RATE, HANN);
    expect(segments).toBe(1);
    expect(stepHz).toBe(10);
  });
});

describe('createWelch', () => {
  const x = seededNoise(5000, 9);

  it.each([
    [1, 128],
    [7, 200],
    [100, 255],
    [128, 0],
    [255, 3],
    [256, 128],
    [300, 192],
    [1000, 0],
    [4999, 17],
  ])('blocks of %i samples, overlap %i, give what the whole record gives', (blockLength, overlapSamples) => {
    const options = { ...HANN, overlapSamples };
    const average = createWelch(RATE, options);
    for (let at = 0; at < x.length; at += blockLength) average.push(x.subarray(at, at + blockLength));
    const streamed = average.finish()!;
    const whole = welch(x, RATE, options);
    expect(streamed.segments).toBe(Math.floor((5000 - 256) / (256 - overlapSamples)) + 1);
    expect(streamed).toEqual(whole);
  });

  it('has nothing to say before the first whole segment', () => {
    const average = createWelch(RATE, HANN);
    average.push(x.subarray(0, 255));
    expect(average.finish()).toBeNull();
    average.push(x.subarray(255, 256));
    expect(average.finish()?.segments).toBe(1);
  });

  it.each([
    [0, 0],
    [256, 256],
    [256, -1],
    [2.5, 0],
  ])('refuses segments of %d samples with an overlap of %d', (segmentLength, overlapSamples) => {
    expect(() => createWelch(RATE, { ...HANN, segmentLength, overlapSamples })).toThrow(RangeError);
  });
});
