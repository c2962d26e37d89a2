import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { analyseRecord, fitHarmonics, synthesise, wrapDegrees, type ProfileName } from '../src/index.js';
import { seededNoise } from './seeded-noise.js';

const RATE = 6000;
const SETTINGS = { seed: 20240611, numRuns: 12 };

interface Order {
  order: number;
  rms: number;
  phaseDeg: number;
}

const series = fc
  .record({
    frequencyHz: fc.double({ min: 49, max: 51, noNaN: true }),
    dc: fc.double({ min: -5, max: 5, noNaN: true }),
    orders: fc.uniqueArray(
      fc.record({
        order: fc.integer({ min: 2, max: 50 }),
        rms: fc.double({ min: 0.5, max: 20, noNaN: true }),
        phaseDeg: fc.double({ min: -180, max: 180, noNaN: true }),
      }),
      { selector: (o) => o.order, maxLength: 8 },
    ),
  })
  .map((s) => ({ ...s, orders: [{ order: 1, rms: 20, phaseDeg: 30 }, ...s.orders] }));

function wave(frequencyHz: number, dc: number, orders: Order[], length = 3120, delayS = 0): Float64Array {
  return Float64Array.from({ length }, (_, n) => {
    const t = n / RATE + delayS;
    return orders.reduce(
      (sum, { order, rms, phaseDeg }) =>
        sum + Math.SQRT2 * rms * Math.cos(2 * Math.PI * order * frequencyHz * t + (phaseDeg * Math.PI) / 180),
      dc,
    );
  });
}

function analyse(samples: Float64Array, profile: ProfileName = 'mains') {
  return analyseRecord({
    sampleRateHz: RATE,
    channels: [{ index: 0, name: 'i', quantity: 'current', unit: 'A', samples }],
    settings: { profile, nominalFrequencyHz: 50 },
  }).channels[0]!;
}

describe('relations that hold for every record', () => {
  it('returns the recipe of a synthesised record', () => {
    fc.assert(
      fc.property(series, ({ frequencyHz, dc, orders }) => {
        const result = analyse(wave(frequencyHz, dc, orders));
        expect(result.fundamental!.frequencyHz).toBeCloseTo(frequencyHz, 5);
        expect(result.mean).toBeCloseTo(dc, 5);
        for (const { order, rms, phaseDeg } of orders) {
          const found = result.harmonics[order - 1]!;
          expect(found.rms).toBeCloseTo(rms, 4);
          expect(Math.abs(wrapDegrees(found.phaseDeg! - phaseDeg))).toBeLessThan(0.01);
        }
      }),
      SETTINGS,
    );
  });

  it('scales every amplitude and nothing else with the signal', () => {
    fc.assert(
      fc.property(
        series,
        fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
        ({ frequencyHz, dc, orders }, gain) => {
          const samples = wave(frequencyHz, dc, orders);
          const [one, other] = [analyse(samples), analyse(samples.map((x) => gain * x))];
          expect(other.fundamental!.frequencyHz).toBeCloseTo(one.fundamental!.frequencyHz, 6);
          expect(other.thdFPercent).toBeCloseTo(one.thdFPercent!, 6);
          expect(other.crestFactor).toBeCloseTo(one.crestFactor!, 9);
          expect(other.rms! / gain / one.rms!).toBeCloseTo(1, 9);
          expect(other.harmonics[0]!.groupRms! / gain / one.harmonics[0]!.groupRms!).toBeCloseTo(1, 7);
        },
      ),
      SETTINGS,
    );
  });

  it('turns only the phases when the record starts later, each by its order', () => {
    fc.assert(
      fc.property(
        series,
        fc.double({ min: 0, max: 0.02, noNaN: true }),
        ({ frequencyHz, dc, orders }, delayS) => {
          const early = analyse(wave(frequencyHz, dc, orders), 'general');
          const late = analyse(wave(frequencyHz, dc, orders, 3120, delayS), 'general');
          for (const { order } of orders) {
            const [a, b] = [early.harmonics[order - 1]!, late.harmonics[order - 1]!];
            expect(b.rms).toBeCloseTo(a.rms, 5);
            const turned = wrapDegrees(b.phaseDeg! - a.phaseDeg! - 360 * order * frequencyHz * delayS);
            expect(Math.abs(turned)).toBeLessThan(0.01);
            expect(Math.abs(wrapDegrees(b.phaseZeroCrossingDeg! - a.phaseZeroCrossingDeg!))).toBeLessThan(
              0.01,
            );
          }
        },
      ),
      SETTINGS,
    );
  });

  it('fits a sum as the sum of the fits', () => {
    const [a, b] = [seededNoise(3001, 1), seededNoise(3001, 2)];
    const fit = (samples: Float64Array) => fitHarmonics(samples, RATE, 50.3, 20);
    const both = fit(a.map((x, n) => x + 2 * b[n]!));
    const [fa, fb] = [fit(a), fit(b)];
    both.harmonics.forEach(({ rms, phaseDeg }, i) => {
      const [p, q] = [phasor(fa.harmonics[i]!), phasor(fb.harmonics[i]!)];
      const sum = phasor({ rms, phaseDeg });
      expect(sum.re).toBeCloseTo(p.re + 2 * q.re, 10);
      expect(sum.im).toBeCloseTo(p.im + 2 * q.im, 10);
    });
    expect(both.dc).toBeCloseTo(fa.dc + 2 * fb.dc, 10);
  });

  it('synthesises a cycle that a fit takes apart again', () => {
    const recipe = [
      { order: 1, rms: 2, phaseDeg: -40 },
      { order: 7, rms: 0.5, phaseDeg: 100 },
    ];
    const cycle = synthesise(recipe, RATE / 50, 1.5);
    const fit = fitHarmonics(cycle, RATE, 50, 9);
    expect(fit.dc).toBeCloseTo(1.5, 10);
    expect(fit.harmonics[6]!.rms).toBeCloseTo(0.5, 10);
    expect(fit.harmonics[6]!.phaseDeg).toBeCloseTo(100, 8);
  });
});

function phasor({ rms, phaseDeg }: { rms: number; phaseDeg: number }): { re: number; im: number } {
  const angle = (phaseDeg * Math.PI) / 180;
  return { re: rms * Math.cos(angle), im: rms * Math.sin(angle) };
}
