import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { pidController } from '../circuits/controller.js';
import { closeLoop } from './close-loop.js';
import { inSeries, padeDelay, withPadeDelay } from './compose.js';
import { responseAt } from './frequency-response.js';
import { loopMargins } from './loop-margins.js';
import { hiddenModes } from './natural-modes.js';
import { closedLoopResponse, nyquist } from './nyquist.js';
import { multiplyPolynomials } from './polynomial.js';
import { stability } from './stability.js';
import { poles, transferFunction, type TransferFunction } from './transfer-function.js';

const thirdOrder = (gain: number) => transferFunction([gain], [1, 3, 3, 1]);
const delayedIntegrator = (gain: number, delayS = 1) => transferFunction([gain], [1, 0], delayS);

describe('nyquist', () => {
  it.each([
    // K/(s + 1)³ is stable below K = 8 (Routh); above it a pair crosses over at √3 rad/s.
    ['K/(s+1)³, K = 7.99', thirdOrder(7.99), 'stable', 0],
    ['K/(s+1)³, K = 8.01', thirdOrder(8.01), 'unstable', 2],
    // K e^(−s)/s is stable below K = π/2; the next pair crosses over at 5π/2 (Hayes 1950).
    ['K e^(−s)/s, K = 1.570', delayedIntegrator(1.57), 'stable', 0],
    ['K e^(−s)/s, K = 1.572', delayedIntegrator(1.572), 'unstable', 2],
    ['K e^(−s)/s, K = 7.85', delayedIntegrator(7.85), 'unstable', 2],
    ['K e^(−s)/s, K = 7.86', delayedIntegrator(7.86), 'unstable', 4],
    // s + K − 1: an unstable plant is held from K = 1 on.
    ['K/(s−1), K = 1.01', transferFunction([1.01], [1, -1]), 'stable', 0],
    ['K/(s−1), K = 0.99', transferFunction([0.99], [1, -1]), 'unstable', 1],
    ['no gain around an unstable plant', transferFunction([0], [1, -1]), 'unstable', 1],
    ['a gain of 3 without dynamics', transferFunction([3], [1]), 'stable', 0],
    // s² + 1 + K: an undamped plant with a derivative, s² + Ks + 1.
    ['K s/(s² + 1)', transferFunction([0.3, 0], [1, 0, 1]), 'stable', 0],
  ])('%s', (_, loop, verdict, closedLoopRightPoles) => {
    expect(nyquist(loop)).toMatchObject({ verdict, closedLoopRightPoles, criticalFrequencyHz: null });
  });

  it('finds where a loop oscillates without end', () => {
    const third = nyquist(thirdOrder(8));
    expect(third.verdict).toBe('marginal');
    expect(third.criticalFrequencyHz).toBeCloseTo(Math.sqrt(3) / (2 * Math.PI), 6);
    const delayed = nyquist(delayedIntegrator(Math.PI / 2));
    expect(delayed.verdict).toBe('marginal');
    expect(delayed.criticalFrequencyHz).toBeCloseTo(0.25, 6);
  });

  it('sees a mode that a zero hides', () => {
    // (s − 1)/((s − 1)(s + 2)): the response is that of 1/(s + 2).
    const loop = transferFunction([1, -1], multiplyPolynomials([1, -1], [1, 2]));
    expect(nyquist(loop)).toMatchObject({
      verdict: 'unstable',
      closedLoopRightPoles: 1,
      openLoopRightPoles: 1,
    });
    const apart = [transferFunction([1, -1], [1, 2]), transferFunction([1], [1, -1])];
    expect(nyquist(apart).verdict).toBe('unstable');
    expect(stability(apart).verdict).toBe('unstable');
    expect(hiddenModes(apart)).toMatchObject([
      { poleStage: 1, zeroStage: 0, isStable: false, pole: { re: 1 } },
    ]);
  });

  it('refuses what no real loop does', () => {
    expect(() => nyquist(transferFunction([1, 0, 0], [1, 1], 0.1))).toThrow(/low-pass/);
    expect(nyquist(transferFunction([2, 1], [1, 3], 0.1))).toMatchObject({ verdict: 'unstable' });
    // Neutral, but with a high-frequency gain below 1: 0.5 e^(−0.1 s), Z = 0 since abs(L) < 1 everywhere.
    expect(nyquist(transferFunction([0.5, 0.5], [1, 1], 0.1))).toMatchObject({ verdict: 'stable' });
  });

  it('counts the poles of any closed loop without delay', () => {
    const coefficient = fc.integer({ min: -30, max: 30 }).map((x) => x / 10);
    const polynomial = fc.array(coefficient, { minLength: 1, maxLength: 4 });
    fc.assert(
      fc.property(polynomial, polynomial, (low, rest) => {
        const loop = transferFunction(low, [1, ...rest, 0.7]);
        if (loop.numerator.length >= loop.denominator.length) return;
        const closed = closeLoop([], loop);
        const all = poles(closed);
        // Poles on or next to the axis are another verdict.
        fc.pre(all.every(({ re, im }) => Math.abs(re) > 1e-4 * Math.hypot(re, im)));
        const right = all.reduce((sum, p) => sum + (p.re > 0 ? p.multiplicity : 0), 0);
        expect(nyquist(loop).closedLoopRightPoles).toBe(right);
      }),
      { numRuns: 150 },
    );
  });
});

describe('closeLoop', () => {
  it('holds a second-order plant with an integral controller as the textbook does', () => {
    // C = 2/s, G = 1/(s + 3): 2/(s² + 3s + 2), poles −1 and −2.
    const controller = transferFunction([2], [1, 0]);
    const closed = closeLoop(controller, transferFunction([1], [1, 3]));
    expect(closed).toEqual({ numerator: [2], denominator: [1, 3, 2] });
    const error = closeLoop(controller, transferFunction([1], [1, 3]), 'reference-to-error');
    expect(error.numerator).toEqual([1, 3, 0]);
    const disturbance = closeLoop(controller, transferFunction([1], [1, 3]), 'disturbance-to-output');
    expect(disturbance).toEqual({ numerator: [1, 0], denominator: [1, 3, 2] });
  });

  it('keeps the unstable pole of a plant that the controller cancels', () => {
    // C = (s − 1)/s, G = 1/(s − 1): from reference to output 1/(s + 1), but a disturbance runs away.
    const closed = closeLoop(transferFunction([1, -1], [1, 0]), transferFunction([1], [1, -1]));
    expect(stability(closed).verdict).toBe('unstable');
    expect(stability(closed).offending[0]).toMatchObject({ re: expect.closeTo(1, 9) });
  });

  it('refuses a delay without a stated approximant, and finds its limit with one', () => {
    expect(() => closeLoop([], delayedIntegrator(1))).toThrow(/infinitely many poles.*Padé order.*Nyquist/);
    expect(stability(closeLoop([], delayedIntegrator(1.565), 'reference-to-output', 4)).verdict).toBe(
      'stable',
    );
    expect(stability(closeLoop([], delayedIntegrator(1.576), 'reference-to-output', 4)).verdict).toBe(
      'unstable',
    );
    expect(() => closeLoop([], transferFunction([-1], [1]))).toThrow(/−1 at every frequency/);
  });

  it('answers on the axis as the exact loop does, far beyond what the approximant can follow', () => {
    // L = e^(−jω)/(jω), by arithmetic, at 40 rad/s: a first-order approximant is long off there.
    const closed = closeLoop([], delayedIntegrator(1), 'reference-to-output', 1);
    const { re, im } = responseAt(closed, 40 / (2 * Math.PI))!;
    // L/(1 + L) = 1/(1 + 1/L) = 1/(1 + jω e^(jω)).
    const [x, y] = [1 - 40 * Math.sin(40), 40 * Math.cos(40)];
    expect(re).toBeCloseTo(x / (x * x + y * y), 12);
    expect(im).toBeCloseTo(-y / (x * x + y * y), 12);
    expect(closedLoopResponse(delayedIntegrator(1))(0)).toEqual({ re: 1, im: 0 });
    expect(responseAt(closed, 0)!.re).toBeCloseTo(1, 12);
    const rational = { numerator: closed.numerator, denominator: closed.denominator };
    const fine = closeLoop([], delayedIntegrator(1), 'reference-to-output', 6);
    const [exact, close] = [responseAt(fine, 0.2)!, responseAt({ ...fine, exact: undefined }, 0.2)!];
    expect(Math.hypot(exact.re - close.re, exact.im - close.im)).toBeLessThan(1e-6);
    expect(responseAt(rational, 40 / (2 * Math.PI))!.re).not.toBeCloseTo(re, 3);
  });

  it('judges a loop with a delay exactly, whatever the approximant says', () => {
    // The limit is π/2; the first-order approximant puts it at 2: 1.9 is unstable all the same.
    const closed = closeLoop([], delayedIntegrator(1.9), 'reference-to-output', 1);
    const { numerator, denominator } = closed;
    expect(stability({ numerator, denominator }).verdict).toBe('stable');
    expect(stability(closed)).toMatchObject({ verdict: 'unstable', offending: [] });
    expect(stability([closed, transferFunction([1], [1, 1])]).reason).toContain(
      '2 poles with positive real part',
    );
  });
});

describe('padeDelay', () => {
  it('has the coefficients of the textbook', () => {
    // (1 − sT/2 + (sT)²/12)/(1 + sT/2 + (sT)²/12), T = 2 (Franklin, Powell and Emami-Naeini).
    const { numerator, denominator } = padeDelay(2, 2);
    expect(numerator.map((c) => c / numerator[2]!)).toEqual([expect.closeTo(1 / 3, 14), -1, 1]);
    expect(denominator).toEqual([expect.closeTo(1 / 3, 14), 1, 1]);
    expect(() => padeDelay(1, 11)).toThrow(/1 to 10/);
  });

  it('is right within 1° where its docstring says so, and no longer much beyond', () => {
    const limits = [0.6, 1.72, 3.07, 4.55];
    limits.forEach((angle, i) => {
      const at = (x: number) => responseAt(padeDelay(1, i + 1), x / (2 * Math.PI))!;
      const off = (x: number) => {
        const { re, im } = at(x);
        const turn = (Math.atan2(im, re) + x) / (2 * Math.PI);
        return Math.abs(turn - Math.round(turn)) * 360;
      };
      expect(off(angle)).toBeLessThan(1);
      expect(off(angle * 1.02)).toBeGreaterThan(1);
      expect(Math.hypot(at(angle).re, at(angle).im)).toBeCloseTo(1, 12);
    });
  });

  it('takes the place of a delay, which itself is exact', () => {
    const h: TransferFunction = transferFunction([1], [1, 1], 0.01);
    expect(withPadeDelay(h, 3).delayS).toBeUndefined();
    // A thousand and a quarter turns: −90° on top of the stage.
    const late = responseAt(transferFunction([1], [1], 1), 1000.25)!;
    expect(late.re).toBeCloseTo(0, 12);
    expect(late.im).toBeCloseTo(-1, 12);
    expect(inSeries([h, h]).delayS).toBe(0.02);
  });
});

describe('loopMargins', () => {
  it('tells the delay that a loop still bears', () => {
    // 1/s crosses 1 at 1 rad/s with 90° in hand: π/2 seconds.
    const { delayMarginS, phaseMarginDeg, gainMarginDb } = loopMargins(transferFunction([1], [1, 0]));
    expect(delayMarginS).toBeCloseTo(Math.PI / 2, 10);
    expect(phaseMarginDeg).toBeCloseTo(90, 10);
    expect(gainMarginDb).toBeNull();
  });
});

describe('pidController', () => {
  it('is the sum of its three actions', () => {
    const c = pidController({ gain: 3, integralTimeS: 0.5, derivativeTimeS: 0.2, derivativeFilter: 10 });
    const omega = 4;
    const { re, im } = responseAt(c, omega / (2 * Math.PI))!;
    // 3 (1 + 1/(j2) + j0.8/(1 + j0.08))
    const lag = 1 + 0.08 ** 2;
    expect(re).toBeCloseTo(3 * (1 + (0.8 * 0.08) / lag), 12);
    expect(im).toBeCloseTo(3 * (-0.5 + 0.8 / lag), 12);
    expect(pidController({ gain: 2 })).toEqual({ numerator: [2], denominator: [1] });
    expect(() => pidController({ gain: 2, integralTimeS: 0 })).toThrow(/integralTimeS .* is 0/);
  });
});
