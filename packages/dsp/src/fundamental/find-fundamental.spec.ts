import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { findFundamental } from './find-fundamental.js';

// Outside truth: every record is made from a fundamental that is known.

interface Line {
  /** Multiple of the fundamental, whole for its own orders. */
  ratio: number;
  amplitude: number;
  phase: number;
}

interface Recipe {
  sampleRateHz: number;
  frequencyHz: number;
  length: number;
  lines: Line[];
  /** Not tied to the fundamental: frequency as a share of the sample rate. */
  strangers: Line[];
  noiseDb: number;
  driftHz: number;
  seed: number;
}

const LOWEST_HZ = 1.3;
const ORDERS = [2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12, 13, 14, 15];

const amplitude = (min: number, max: number) =>
  fc.double({ min: Math.log(min), max: Math.log(max), noNaN: true }).map(Math.exp);
const phase = fc.double({ min: -Math.PI, max: Math.PI, noNaN: true });

/** A series with three or more harmonics of like strength, in noise 20 to 60 dB below it, and lines that belong to nothing. */
function series(options: { fundamental: [number, number]; strangers: number; drift?: number }) {
  return fc
    .record({
      sampleRateHz: fc.constantFrom(1000, 5000, 12_800, 48_000),
      length: fc.constantFrom(8000, 12_800, 20_000, 32_768, 40_000),
      cycles: amplitude(25, 250),
      fundamental: amplitude(...options.fundamental),
      harmonics: fc.subarray(ORDERS, { minLength: 3 }),
      amplitudes: fc.array(amplitude(0.2, 1), { minLength: ORDERS.length, maxLength: ORDERS.length }),
      phases: fc.array(phase, { minLength: ORDERS.length + 1, maxLength: ORDERS.length + 1 }),
      strangers: fc.array(
        fc.record({
          ratio: fc.double({ min: 0.02, max: 0.48, noNaN: true }),
          amplitude: amplitude(0.05, 1),
          phase,
        }),
        { maxLength: options.strangers, minLength: options.strangers },
      ),
      noiseDb: fc.double({ min: 20, max: 60, noNaN: true }),
      seed: fc.integer({ min: 1, max: 1e6 }),
    })
    .map(({ cycles, fundamental, harmonics, amplitudes, phases, ...rest }): Recipe => ({
      ...rest,
      frequencyHz: (cycles * rest.sampleRateHz) / rest.length,
      driftHz: options.drift ?? 0,
      lines: [
        { ratio: 1, amplitude: fundamental, phase: phases[0]! },
        ...harmonics.map((order, i) => ({ ratio: order, amplitude: amplitudes[i]!, phase: phases[i + 1]! })),
      ],
    }))
    .filter(
      (recipe) => recipe.frequencyHz >= LOWEST_HZ && belongToNothing(recipe) && fundamentalStandsOut(recipe),
    );
}

/** No stranger near a multiple of the fundamental or of a half to a tenth of it. */
function belongToNothing({ strangers, frequencyHz, sampleRateHz, length }: Recipe): boolean {
  const lineHz = sampleRateHz / length;
  return strangers.every(({ ratio }) =>
    [1, 2, 3, 4, 5, 6, 7, 8, 9, 10].every((divisor) => {
      const multiples = (ratio * sampleRateHz * divisor) / frequencyHz;
      return Math.abs(multiples - Math.round(multiples)) * frequencyHz > 2 * divisor * lineHz;
    }),
  );
}

/** The fundamental alone is at least ten standard deviations of its own estimate: A²N/4 > 25 s². */
function fundamentalStandsOut({ lines, noiseDb, length }: Recipe): boolean {
  return (lines[0]!.amplitude ** 2 * length) / 4 > 25 * noiseVariance(lines, noiseDb);
}

function noiseVariance(lines: Line[], noiseDb: number): number {
  return lines.reduce((sum, line) => sum + line.amplitude ** 2 / 2, 0) * 10 ** (-noiseDb / 10);
}

function record({ sampleRateHz, frequencyHz, length, lines, strangers, noiseDb, driftHz, seed }: Recipe) {
  const deviation = Math.sqrt(noiseVariance(lines, noiseDb));
  const durationS = length / sampleRateHz;
  return seededNoise(length, seed).map((noise, n) => {
    const t = n / sampleRateHz;
    const cycles = frequencyHz * t + (driftHz * t * (t - durationS)) / (2 * durationS);
    const own = lines.reduce(
      (sum, l) => sum + l.amplitude * Math.cos(2 * Math.PI * l.ratio * cycles + l.phase),
      0,
    );
    const other = strangers.reduce(
      (sum, l) => sum + l.amplitude * Math.cos(2 * Math.PI * l.ratio * n + l.phase),
      0,
    );
    return deviation * noise + own + other;
  });
}

function find(recipe: Recipe, nominalFrequencyHz: number | 'auto' = 'auto') {
  return findFundamental(record(recipe), recipe.sampleRateHz, { nominalFrequencyHz });
}

/** Within a tenth of a line of the record, and for a moving frequency within the range it moved through. */
function expectFound(recipe: Recipe, nominalFrequencyHz: number | 'auto' = 'auto'): void {
  const estimate = find(recipe, nominalFrequencyHz);
  const tolerance = Math.max((0.1 * recipe.sampleRateHz) / recipe.length, recipe.driftHz / 2);
  expect(estimate).not.toBeNull();
  expect(Math.abs(estimate!.frequencyHz - recipe.frequencyHz)).toBeLessThan(tolerance);
}

const RUNS = { seed: 20261201, numRuns: 60 };

describe('findFundamental', () => {
  it('finds a fundamental of 1 % to 300 % of its harmonics', () => {
    fc.assert(fc.property(series({ fundamental: [0.01, 3], strangers: 0 }), expectFoundAuto), RUNS);
  });

  it('is not misled by three lines that belong to nothing', () => {
    fc.assert(fc.property(series({ fundamental: [0.05, 3], strangers: 3 }), expectFoundAuto), RUNS);
  });

  it('takes a hint', () => {
    const recipes = series({ fundamental: [0.05, 3], strangers: 2 });
    const hints = fc.double({ min: 0.9, max: 1.1, noNaN: true });
    fc.assert(
      fc.property(recipes, hints, (recipe, factor) => expectFound(recipe, factor * recipe.frequencyHz)),
      RUNS,
    );
  });

  it.each([50, 60, 400])('follows a drift of 0.5 Hz around %d Hz', (frequencyHz) => {
    const recipes = series({ fundamental: [0.1, 3], strangers: 1, drift: 0.5 }).map((recipe) => ({
      ...recipe,
      frequencyHz,
      sampleRateHz: 40 * frequencyHz,
      length: 40_000,
    }));
    fc.assert(fc.property(recipes.filter(belongToNothing), expectFoundAuto), { ...RUNS, numRuns: 15 });
  });

  // A pure tone has nothing but its own line.
  it.each([
    [1.3, 1000],
    [3, 1000],
    [49.97, 50_000],
    [997.13, 48_000],
    [21_600, 48_000],
    [449.9, 1000],
  ])('finds a pure tone of %d Hz at %d Hz', (frequencyHz, sampleRateHz) => {
    const line = { ratio: 1, amplitude: 1, phase: 0.3 };
    const base = { sampleRateHz, frequencyHz, length: 30_000, strangers: [], driftHz: 0, seed: 5 };
    expectFound({ ...base, lines: [line], noiseDb: 20 });
    expectFound({ ...base, lines: [line], noiseDb: 60 });
  });

  // As recorded in a plant: a weak 50 Hz line and its odd orders beside a row of strong lines 100 Hz apart that are no
  // multiples of anything.
  it('finds weak mains among a row of strong pick-ups', () => {
    const lines = [1, 3, 5, 7].map((ratio, i) => ({
      ratio,
      amplitude: [0.3, 0.1, 0.04, 0.04][i]!,
      phase: i,
    }));
    const strangers = [263.26, 363.26, 463.26, 563.26, 663.26, 2105.81].map((f, i) => ({
      ...{ ratio: f / 5760, amplitude: 0.6, phase: 2 * i },
    }));
    expectFound({
      ...{ sampleRateHz: 5760, frequencyHz: 49.985, length: 24_768 },
      ...{ lines, strangers, noiseDb: 30, driftHz: 0, seed: 11 },
    });
  });

  it('finds the tone beside ten lines of hum 40 dB below it', () => {
    const hum = Array.from({ length: 10 }, (_, i) => ({
      ratio: (50 * (i + 1)) / 48_000,
      amplitude: 0.01,
      phase: i,
    }));
    expectFound({
      ...{ sampleRateHz: 48_000, frequencyHz: 997.13, length: 96_000, strangers: hum },
      ...{ lines: [{ ratio: 1, amplitude: 1, phase: 0.3 }], noiseDb: 60, driftHz: 0, seed: 12 },
    });
  });

  // Rounded to a few steps, a coherent tone gets lines on very many combs.
  it.each([1021, 1877, 3061, 3989])('finds a tone of %i cycles in 8192 samples of three steps', (cycles) => {
    const samples = Float64Array.from({ length: 8192 }, (_, n) =>
      Math.round(1.3 * Math.cos((2 * Math.PI * ((cycles * n) % 8192)) / 8192 + 0.4)),
    );
    const estimate = findFundamental(samples, 8192, { nominalFrequencyHz: 'auto' });
    expect(estimate?.frequencyHz).toBeCloseTo(cycles, 1);
  });

  // Cramér-Rao bound: the error is within 4 standard deviations in all but 1 of 16 000 cases.
  it('states the uncertainty that it has', () => {
    const errors = Array.from({ length: 60 }, (_, i) => {
      const lines = [1, 3, 5].map((ratio) => ({ ratio, amplitude: 1 / ratio, phase: i }));
      const recipe = { sampleRateHz: 5000, frequencyHz: 50 + i / 60, length: 10_000, lines, strangers: [] };
      const estimate = find({ ...recipe, noiseDb: 30, driftHz: 0, seed: 300 + i })!;
      return (estimate.frequencyHz - recipe.frequencyHz) / estimate.frequencyUncertaintyHz;
    });
    const spread = Math.sqrt(errors.reduce((sum, e) => sum + e * e, 0) / errors.length);
    expect(Math.max(...errors.map(Math.abs))).toBeLessThan(4);
    expect(spread).toBeGreaterThan(0.75);
    expect(spread).toBeLessThan(1.25);
  });

  it.each([1, 2, 3, 4, 5, 6])('finds nothing in noise alone (%i)', (seed) => {
    const noise = seededNoise(20_000, 40 + seed);
    expect(findFundamental(noise, 5000, { nominalFrequencyHz: 'auto' })).toBeNull();
    expect(findFundamental(noise, 5000, { nominalFrequencyHz: 50 })).toBeNull();
  });

  it('finds nothing at the nominal frequency when only a multiple of it is there', () => {
    const recipe = {
      ...{ sampleRateHz: 5000, frequencyHz: 150, length: 10_000, strangers: [], driftHz: 0 },
      ...{ lines: [{ ratio: 1, amplitude: 1, phase: 0 }], noiseDb: 40, seed: 3 },
    };
    expect(find(recipe, 50)).toBeNull();
    expect(find(recipe, 150)?.frequencyHz).toBeCloseTo(150, 2);
  });

  it('finds nothing in less than one cycle or in a constant', () => {
    const part = Float64Array.from({ length: 900 }, (_, n) => Math.cos((2 * Math.PI * n) / 1000));
    expect(findFundamental(part, 1000, { nominalFrequencyHz: 1 })).toBeNull();
    expect(findFundamental(new Float64Array(1000).fill(3), 1000, { nominalFrequencyHz: 'auto' })).toBeNull();
  });
});

function expectFoundAuto(recipe: Recipe): void {
  expectFound(recipe);
}
