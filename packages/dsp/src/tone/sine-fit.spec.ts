import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { sineFit3, sineFit4 } from './sine-fit.js';

/** 24 samples at 1 kHz of a distorted sine near 63.7 Hz, rounded to three decimals. */
const SAMPLES = Float64Array.of(
  ...[1.607, 0.87, -0.013, -0.593, -0.835, -1.03, -1.248, -1.28, -0.675, 0.198, 0.883, 1.285],
  ...[1.667, 2.014, 2.217, 1.868, 1.146, 0.5, 0.072, -0.38, -1.079, -1.494, -1.367, -0.792],
);

describe('sineFit3', () => {
  // numpy 1.24.2: linalg.lstsq on cos(2π 63.7 n/1000), sin(…), 1.
  it('is the linear least-squares solution', () => {
    const fit = sineFit3(SAMPLES, 1000, 63.7);
    expect(fit.frequencyHz).toBeCloseTo(63.7, 12);
    expect(fit.amplitude).toBeCloseTo(1.7057583025727223, 12);
    expect(fit.phaseDeg).toBeCloseTo(51.501696295515025, 10);
    expect(fit.offset).toBeCloseTo(0.40028716768916084, 12);
    expect(fit.residualRms).toBeCloseTo(0.14665227258956512, 12);
  });
});

describe('sineFit4', () => {
  // scipy 1.10.1: optimize.curve_fit of A cos(2πft + φ) + C, started at 60 Hz, tolerances 1e-15.
  it.each([60, 63.7, 70])('is the nonlinear least-squares solution from %d Hz', (startHz) => {
    const fit = sineFit4(SAMPLES, 1000, startHz);
    expect(fit.frequencyHz).toBeCloseTo(63.63907234156321, 5);
    expect(fit.amplitude).toBeCloseTo(1.705816255775396, 6);
    expect(fit.phaseDeg).toBeCloseTo(51.72926942679065, 4);
    expect(fit.offset).toBeCloseTo(0.40052911926019424, 6);
    expect(fit.residualRms).toBeCloseTo(0.1466181626915745, 9);
  });

  // Closed form: without noise the parameters come back.
  it.each([
    [50.02, 10.4],
    [997.13, 210],
    [4800, 3.3],
  ])('finds a sine of %d Hz exactly', (frequencyHz, lengthMs) => {
    const x = Float64Array.from(
      { length: lengthMs * 10 * 10 },
      (_, n) => 2.5 * Math.cos((2 * Math.PI * frequencyHz * n) / 10_000 + 0.5) - 0.3,
    );
    const fit = sineFit4(
      x,
      10_000,
      frequencyHz + ((0.3 * 10_000) / x.length) * (frequencyHz > 4000 ? -1 : 1),
    );
    expect(fit.frequencyHz).toBeCloseTo(frequencyHz, 5);
    expect(fit.amplitude).toBeCloseTo(2.5, 6);
    expect(fit.phaseDeg).toBeCloseTo((0.5 * 180) / Math.PI, 4);
    expect(fit.offset).toBeCloseTo(-0.3, 7);
  });

  // Cramér-Rao bound of the frequency (Kay 1993, 3.11): fs/2π √(24 s²/(A² N(N² − 1))); 200 trials leave 5 % on a spread.
  it('reaches the Cramér-Rao bound in white noise', () => {
    const count = 500;
    const errors = Array.from({ length: 200 }, (_, trial) => {
      const noise = seededNoise(count, 100 + trial);
      const x = noise.map((e, n) => 0.1 * e + Math.cos(2 * Math.PI * 0.0837 * n + trial));
      return sineFit4(x, 1, 0.0835).frequencyHz - 0.0837;
    });
    const spread = Math.sqrt(errors.reduce((sum, e) => sum + e * e, 0) / errors.length);
    const bound = Math.sqrt((24 * 0.01) / (count * (count ** 2 - 1))) / (2 * Math.PI);
    expect(spread / bound).toBeGreaterThan(0.85);
    expect(spread / bound).toBeLessThan(1.15);
  });
});

describe('sine fits', () => {
  it.each([0, -5, 500, NaN])('refuse the frequency %d Hz at 1 kHz', (frequencyHz) => {
    expect(() => sineFit3(SAMPLES, 1000, frequencyHz)).toThrow(RangeError);
    expect(() => sineFit4(SAMPLES, 1000, frequencyHz)).toThrow(RangeError);
  });

  it('refuse fewer samples than unknowns', () => {
    expect(() => sineFit4(SAMPLES.subarray(0, 3), 1000, 100)).toThrow(RangeError);
  });
});
