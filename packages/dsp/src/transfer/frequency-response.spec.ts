import { describe, expect, it } from 'vitest';
import { AnalysisInputError } from '../errors.js';
import { frequencyResponse } from './frequency-response.js';
import { dcGain, transferFunction, zeros } from './transfer-function.js';

describe('frequencyResponse', () => {
  it('is −3.01 dB and −45° at the cut-off of an RC low-pass, and 1/√(1 + h²) above', () => {
    const tau = 1 / (2 * Math.PI * 1000);
    const [at1, at3] = frequencyResponse(transferFunction([1], [tau, 1]), [1000, 3000]);
    expect(at1!.magnitudeDb).toBeCloseTo(-3.010299957, 9);
    expect(at1!.phaseDeg).toBeCloseTo(-45, 10);
    expect(at3!.magnitude).toBeCloseTo(0.316227766, 9);
    expect(at3!.phaseDeg).toBeCloseTo(-71.565051, 6);
  });

  it('agrees with scipy.signal.freqs (1.10) on a Butterworth low-pass of fourth order', () => {
    const h = transferFunction([1], [1, 2.613125929752753, 3.414213562373095, 2.613125929752753, 1]);
    const points = frequencyResponse(
      h,
      [0.5, 1, 2].map((omega) => omega / (2 * Math.PI)),
    );
    const magnitudes = [0.99805258, 0.70710678, 0.06237829];
    points.forEach((point, i) => expect(point.magnitude).toBeCloseTo(magnitudes[i]!, 8));
    expect(points[0]!.phaseDeg).toBeCloseTo(-77.96321121, 8);
    expect(Math.abs(points[1]!.phaseDeg!)).toBeCloseTo(180, 8);
    expect(points[2]!.phaseDeg).toBeCloseTo(77.96321121, 8);
  });

  it('has the resonance of a second-order stage where theory puts it', () => {
    // Peak of w0²/(s² + 2ζw0 s + w0²) at w0√(1 − 2ζ²): 1/(2ζ√(1 − ζ²)).
    const [zeta, omega] = [0.1, 1000];
    const h = transferFunction([omega ** 2], [1, 2 * zeta * omega, omega ** 2]);
    const peak = frequencyResponse(h, [(omega * Math.sqrt(1 - 2 * zeta ** 2)) / (2 * Math.PI)])[0]!;
    expect(peak.magnitude).toBeCloseTo(1 / (2 * zeta * Math.sqrt(1 - zeta ** 2)), 10);
  });

  it('does not overflow at high degree and frequency', () => {
    // (s + 1)^50 at 1 GHz: magnitude about ω^−50 below the smallest double in each part, but H = s^50/(s + 1)^50 is 1.
    const binomial = Array.from({ length: 51 }, (_, k) =>
      Array.from({ length: k }, (_, i) => (50 - i) / (i + 1)).reduce((a, b) => a * b, 1),
    );
    const highPass = transferFunction([1, ...new Array<number>(50).fill(0)], binomial);
    const point = frequencyResponse(highPass, [1e9])[0]!;
    expect(point.magnitude).toBeCloseTo(1, 12);
    expect(point.phaseDeg).toBeCloseTo((50 * 180) / Math.PI / (2 * Math.PI * 1e9), 10);
  });

  it('has no value at a pole and no angle at a zero', () => {
    const none = { magnitude: null, magnitudeDb: null, phaseDeg: null };
    expect(frequencyResponse(transferFunction([3], [1, 0]), [0])[0]).toMatchObject(none);
    const omega = 2 * Math.PI * 50;
    expect(frequencyResponse(transferFunction([1], [1, 0, omega ** 2]), [50])[0]).toMatchObject(none);
    const differentiator = frequencyResponse(transferFunction([1, 0], [1]), [0])[0];
    expect(differentiator).toMatchObject({ magnitude: 0, magnitudeDb: null, phaseDeg: null });
  });
});

describe('transferFunction', () => {
  it('gives gain at DC with a common factor s cancelled', () => {
    expect(dcGain(transferFunction([1, 5], [1, 2, 10]))).toBe(0.5);
    expect(dcGain(transferFunction([3, 0], [1, 6, 0]))).toBe(0.5);
    expect(dcGain(transferFunction([3], [1, 0]))).toBeNull();
    expect(dcGain(transferFunction([], [1]))).toBe(0);
  });

  it('gives the zeros of a notch', () => {
    // Series L-C at 1/√(LC) = 10⁴ rad/s.
    expect(zeros(transferFunction([1e-8, 0, 1], [1e-8, 2e-5, 1])).map(({ im }) => im)).toEqual([
      expect.closeTo(-1e4, 8),
      expect.closeTo(1e4, 8),
    ]);
  });

  it.each([
    ['a zero denominator', [1], [0, 0], /denominator .* is zero/],
    ['a coefficient that is no number', [1, NaN], [1], /Coefficient 2 of the numerator/],
    ['too high a degree', [1], new Array<number>(60).fill(1), /degree 59/],
  ])('refuses %s', (_, numerator, denominator, message) => {
    const make = () => transferFunction(numerator, denominator);
    expect(make).toThrow(AnalysisInputError);
    expect(make).toThrow(message);
  });
});
