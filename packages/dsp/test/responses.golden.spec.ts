import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import {
  frequencyResponse,
  loopMargins,
  partialFractions,
  responseOf,
  stageTransfer,
  timeResponse,
  transferFunction,
  type CircuitValues,
} from '../src/index.js';

type Pair = [number, number];
interface Rational {
  numerator: number[];
  denominator: number[];
}
interface References {
  stages: Record<
    string,
    Rational & {
      frequenciesHz: number[];
      response: Pair[];
      timesS: number[];
      step: number[];
      impulse?: number[];
    }
  >;
  circuits: Record<string, { values: CircuitValues; frequenciesHz: number[]; response: Pair[] }>;
  loops: Record<string, Rational & { delayS: number; gainCrossings: Pair[]; phaseCrossings: Pair[] }>;
  partialFractions: Rational & { residues: Pair[]; poles: Pair[]; direct: number[] };
}

/** By SciPy 1.10 and NumPy 1.24; see fixtures/responses/SOURCE.md. */
const references = JSON.parse(
  readFileSync(new URL('../../../fixtures/responses/responses.json', import.meta.url), 'utf8'),
) as References;

function expectClose(got: ArrayLike<number>, wanted: readonly number[], tolerance: number): void {
  const size = Math.max(...wanted.map(Math.abs));
  expect(got.length).toBe(wanted.length);
  wanted.forEach((x, i) =>
    expect(Math.abs(got[i]! - x), `element ${i}`).toBeLessThanOrEqual(tolerance * size),
  );
}

describe.each(Object.entries(references.stages))('%s', (_, stage) => {
  const h = transferFunction(stage.numerator, stage.denominator);

  it('responds as scipy.signal.freqs says', () => {
    const points = frequencyResponse(h, stage.frequenciesHz);
    points.forEach(({ magnitude, phaseDeg }, i) => {
      const [re, im] = stage.response[i]!;
      expect(magnitude! / Math.hypot(re, im) - 1).toBeCloseTo(0, 10);
      const turn = phaseDeg! - (Math.atan2(im, re) * 180) / Math.PI;
      expect(turn - 360 * Math.round(turn / 360)).toBeCloseTo(0, 8);
    });
  });

  it('answers a step as scipy.signal.step says', () => {
    expectClose(timeResponse(h, 'step').sample(stage.timesS), stage.step, 1e-8);
  });

  it('answers an impulse as scipy.signal.impulse says', () => {
    const response = timeResponse(h, 'impulse');
    const { impulse, numerator, denominator } = stage;
    expect(response.impulses).toEqual(impulse ? [] : [numerator[0]! / denominator[0]!]);
    if (impulse) expectClose(response.sample(stage.timesS), impulse, 1e-8);
  });
});

describe.each(Object.entries(references.circuits))('%s', (circuit, { values, frequenciesHz, response }) => {
  it('responds as its impedances do', () => {
    const at = responseOf(stageTransfer({ kind: 'circuit', circuit: circuit, values }));
    frequenciesHz.forEach((frequencyHz, i) => {
      const { re, im } = at(frequencyHz)!;
      const [wantedRe, wantedIm] = response[i]!;
      expect(Math.hypot(re - wantedRe, im - wantedIm) / Math.hypot(wantedRe, wantedIm)).toBeLessThan(1e-11);
    });
  });
});

describe.each(Object.entries(references.loops))('margins of a loop: %s', (_, loop) => {
  const margins = loopMargins(transferFunction(loop.numerator, loop.denominator, loop.delayS));

  it('crosses a gain of 1 where scipy.optimize.brentq finds it', () => {
    const got = margins.gainCrossings.map((c) => [c.frequencyHz, c.phaseMarginDeg]);
    expectClose(got.flat(), loop.gainCrossings.flat(), 1e-9);
  });

  it('crosses −180° where scipy.optimize.brentq finds it', () => {
    const got = margins.phaseCrossings.map((c) => [c.frequencyHz, c.gainMarginDb]);
    expect(got.length).toBeGreaterThanOrEqual(loop.phaseCrossings.length);
    expectClose(got.slice(0, loop.phaseCrossings.length).flat(), loop.phaseCrossings.flat(), 1e-9);
  });
});

describe('partialFractions', () => {
  it('agrees with scipy.signal.residue at a triple pole', () => {
    const { numerator, denominator, residues, direct } = references.partialFractions;
    const found = partialFractions(numerator, denominator);
    expect(found.direct).toEqual(direct);
    expect(found.fractions.map(({ pole }) => pole.re)).toEqual([
      expect.closeTo(-1, 9),
      expect.closeTo(-3, 9),
    ]);
    const got = found.fractions.flatMap(({ residues: list }) => list.map(({ re }) => re));
    expectClose(
      got,
      residues.map(([re]) => re),
      1e-9,
    );
  });
});
