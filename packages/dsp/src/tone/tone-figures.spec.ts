import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { combineToneFigures, toneFigures } from './tone-figures.js';

const RATE = 48_000;

interface Recipe {
  frequencyHz: number;
  length: number;
  /** Order to level in dBc. */
  harmonics?: Record<number, number>;
  noiseDbc?: number;
  spur?: { frequencyHz: number; dbc: number };
  amplitude?: number;
  dc?: number;
}

/** A cosine of peak `amplitude` with harmonics, spur and white noise; levels by power relative to the tone. */
function record(
  { frequencyHz, length, harmonics = {}, noiseDbc, spur, amplitude = 1, dc = 0 }: Recipe,
  start = 0,
) {
  const noise = seededNoise(length, 77 + start);
  const deviation = noiseDbc === undefined ? 0 : (10 ** (noiseDbc / 20) * amplitude) / Math.SQRT2;
  const lines: [number, number, number][] = [
    [frequencyHz, amplitude, 0.4],
    ...Object.entries(harmonics).map(([order, dbc]): [number, number, number] => [
      Number(order) * frequencyHz,
      amplitude * 10 ** (dbc / 20),
      1.1 * Number(order),
    ]),
  ];
  if (spur) lines.push([spur.frequencyHz, amplitude * 10 ** (spur.dbc / 20), 2.2]);
  return Float64Array.from({ length }, (_, n) =>
    lines.reduce(
      (sum, [f, a, phase]) => sum + a * Math.cos((2 * Math.PI * ((f * (n + start)) % RATE)) / RATE + phase),
      dc + deviation * noise[n]!,
    ),
  );
}

/** A tone 48.3 cycles long, off every line, with a known second harmonic and noise. */
const KNOWN: Recipe = { frequencyHz: 997.13, length: 65_536, harmonics: { 2: -50 }, noiseDbc: -60 };

describe('toneFigures', () => {
  // Arithmetic of levels: noise −60 dB and one harmonic at −50 dB make SINAD 49.586 dB and ENOB 7.944; 65536 samples of
  // noise leave 0.03 dB (one standard deviation) on its power.
  it.each([
    ['off the grid', KNOWN],
    ['coherent', { ...KNOWN, frequencyHz: (1361 * RATE) / 65_536 }],
  ])('adds up the levels of a known record %s', (_, recipe) => {
    const tone = toneFigures(record(recipe), RATE, recipe.frequencyHz + 0.1);
    expect(tone.frequencyHz).toBeCloseTo(recipe.frequencyHz, 4);
    expect(20 * Math.log10(tone.thdFPercent! / 100)).toBeCloseTo(-50, 1);
    expect(tone.harmonicsDbc[0]).toBeCloseTo(-50, 1);
    expect(Math.abs(tone.snrDb! - 60)).toBeLessThan(0.1);
    expect(Math.abs(tone.sinadDb! - 49.586)).toBeLessThan(0.03);
    expect(Math.abs(tone.enobBits! - 7.944)).toBeLessThan(0.006);
    expect(tone.sfdrDb).toBeCloseTo(50, 1);
    expect(tone.spurFrequencyHz).toBeCloseTo(2 * recipe.frequencyHz, 1);
  });

  // Noise 70 dB below the harmonics: it must not drown in the rounding of their difference.
  it('keeps the noise beside strong harmonics', () => {
    const recipe = { frequencyHz: 5000.7, length: 65_536, harmonics: { 2: -30, 3: -34 }, noiseDbc: -100 };
    const { snrDb } = toneFigures(record(recipe), RATE, 5000.7);
    expect(Math.abs(snrDb! - 100)).toBeLessThan(0.1);
  });

  // THD_R = THD_F/√(1 + THD_F²); orders 1, 0.1, 0.05, 0.02 give 11.3578 % and 11.2853 %.
  it('relates the two kinds of THD', () => {
    const harmonics = { 2: -20, 3: 20 * Math.log10(0.05), 4: 20 * Math.log10(0.02) };
    const tone = toneFigures(record({ frequencyHz: 1234.5, length: 20_000, harmonics }), RATE, 1234.5);
    expect(tone.thdFPercent).toBeCloseTo(11.3578167, 6);
    expect(tone.thdRPercent).toBeCloseTo(11.28526, 5);
  });

  // Folding: |h f − fs round(h f/fs)|. 3 × 11111 Hz appears at 14667 Hz, 5 × at 7555 Hz.
  it('follows harmonics above half the sample rate to where they fold', () => {
    const harmonics = { 3: -40, 5: -60 };
    const { harmonicsDbc, spurFrequencyHz, powers } = toneFigures(
      record({ frequencyHz: 11_111, length: 30_000, harmonics, noiseDbc: -90 }),
      RATE,
      11_111,
    );
    expect(harmonicsDbc[1]).toBeCloseTo(-40, 2);
    expect(harmonicsDbc[3]).toBeCloseTo(-60, 1);
    expect(spurFrequencyHz).toBeCloseTo(RATE - 3 * 11_111, 3);
    expect(powers.harmonics[3]!.frequencyHz).toBeCloseTo(5 * 11_111 - RATE, 3);
  });

  it('gives no level to an order that folds onto another line', () => {
    // 4 × 9600 = 48000 − 9600 and 5 × 9600 = 48000: on the tone and on DC.
    const { harmonicsDbc } = toneFigures(
      record({ frequencyHz: 9600, length: 10_000, noiseDbc: -80 }),
      RATE,
      9600,
    );
    expect(harmonicsDbc[2]).toBeNull();
    expect(harmonicsDbc[3]).toBeNull();
    expect(harmonicsDbc[0]).not.toBeNull();
  });

  // Density of white noise of variance s²: s √(2/fs), whatever else stands in the spectrum.
  it('measures the noise floor between the lines', () => {
    const spur = { frequencyHz: 7777.7, dbc: -30 };
    const tone = toneFigures(record({ ...KNOWN, spur }), RATE, 997.13);
    const deviation = 1e-3 / Math.SQRT2;
    expect(tone.noiseDensity! / (deviation * Math.sqrt(2 / RATE))).toBeGreaterThan(0.98);
    expect(tone.noiseDensity! / (deviation * Math.sqrt(2 / RATE))).toBeLessThan(1.02);
  });

  it.each([
    ['between two lines', 7777.7],
    ['on a line of a coherent record', (11_000 * RATE) / 65_536],
  ])('finds a spur %s with its level', (_, frequencyHz) => {
    const coherent = frequencyHz > 8000;
    const f0 = coherent ? (1361 * RATE) / 65_536 : 997.13;
    const recipe = {
      ...KNOWN,
      frequencyHz: f0,
      harmonics: {},
      noiseDbc: -90,
      spur: { frequencyHz, dbc: -72 },
    };
    const tone = toneFigures(record(recipe), RATE, f0);
    expect(Math.abs(tone.sfdrDb! - 72)).toBeLessThan(0.05);
    expect(Math.abs(tone.spurFrequencyHz! - frequencyHz)).toBeLessThan(0.02);
  });

  describe('within a band', () => {
    const band = { fromHz: 500, toHz: 5000 };

    // Of white noise the band holds 4500/24000; lines inside count in full, lines outside not at all.
    it.each([
      [4990, true],
      [5010, false],
      [510, true],
      [490, false],
    ])('a line at %d Hz counts: %s', (frequencyHz, inside) => {
      const recipe = { ...KNOWN, harmonics: {}, spur: { frequencyHz, dbc: -50 } };
      const { thdPlusNBandPercent, bandHz } = toneFigures(record(recipe), RATE, 997.13, { band });
      const residual = (1e-6 * 4500) / 24_000 + (inside ? 1e-5 : 0);
      expect(bandHz).toEqual(band);
      expect(thdPlusNBandPercent! / (100 * Math.sqrt(residual / (1 + residual)))).toBeGreaterThan(0.98);
      expect(thdPlusNBandPercent! / (100 * Math.sqrt(residual / (1 + residual)))).toBeLessThan(1.02);
    });

    it('counts a harmonic inside and not one outside', () => {
      const recipe = { ...KNOWN, harmonics: { 2: -40, 6: -20 }, noiseDbc: -100 };
      const { thdPlusNBandPercent } = toneFigures(record(recipe), RATE, 997.13, { band });
      expect(thdPlusNBandPercent).toBeCloseTo(1, 3);
    });

    it('says nothing about a tone outside it', () => {
      const outside = { fromHz: 2000, toHz: 5000 };
      expect(toneFigures(record(KNOWN), RATE, 997.13, { band: outside }).thdPlusNBandPercent).toBeNull();
      expect(toneFigures(record(KNOWN), RATE, 997.13).thdPlusNBandPercent).toBeNull();
    });
  });

  // A sine of half the full-scale amplitude is at −6.0206 dBFS and loses one bit against a full-scale sine.
  it('refers to full scale where it is known', () => {
    const samples = record({ ...KNOWN, amplitude: 5, dc: 0.7 });
    const tone = toneFigures(samples, RATE, 997.13, { fullScalePeak: 10 });
    expect(tone.levelDbfs).toBeCloseTo(-6.0206, 4);
    expect(tone.enobFullScaleBits! - tone.enobBits!).toBeCloseTo(1, 4);
    expect(tone.dc).toBeCloseTo(0.7, 3);
    const unknown = toneFigures(samples, RATE, 997.13);
    expect([unknown.levelDbfs, unknown.enobFullScaleBits]).toEqual([null, null]);
  });

  it('gives no ratio to mere rounding', () => {
    const { sinadDb, snrDb, sfdrDb, enobBits, noiseDensity } = toneFigures(
      record({ frequencyHz: 1000, length: 48_000 }),
      RATE,
      1000,
    );
    expect([sinadDb, snrDb, sfdrDb, enobBits, noiseDensity]).toEqual([null, null, null, null, null]);
  });

  // 24 bit: 6.02 N + 1.76 dB = 146.26 dB (IEEE 1241).
  it('resolves the quantisation of 24 bits', () => {
    const samples = record({ frequencyHz: 997.13, length: 65_536 }).map(
      (x) => Math.round(x * 2 ** 23) / 2 ** 23,
    );
    expect(Math.abs(toneFigures(samples, RATE, 997.13).sinadDb! - 146.26)).toBeLessThan(0.1);
  });
});

describe('combineToneFigures', () => {
  const length = 16_384;
  const stretchesOf = (recipe: Recipe, count: number) =>
    Array.from({ length: count }, (_, i) =>
      toneFigures(record({ ...recipe, length }, i * length), RATE, recipe.frequencyHz, {
        band: { fromHz: 20, toHz: 20_000 },
      }),
    );

  it('gives what the whole record gives', () => {
    const spur = { frequencyHz: 7777.7, dbc: -45 };
    const [a, b, c, d] = stretchesOf({ ...KNOWN, spur }, 4);
    const combined = combineToneFigures([a!, b!, c!, d!], { band: { fromHz: 20, toHz: 20_000 } });
    // Arithmetic of levels: −45, −50 and −60 dB add up to −43.698 dB.
    expect(Math.abs(combined.sinadDb! - 43.698)).toBeLessThan(0.03);
    expect(combined.sfdrDb).toBeCloseTo(45, 1);
    expect(combined.spurFrequencyHz).toBeCloseTo(7777.7, 1);
    expect(Math.abs(combined.snrDb! - 44.865)).toBeLessThan(0.03);
    expect(combined.powers.sampleCount).toBe(65_536);
    expect(combined.thdPlusNBandPercent).toBeGreaterThan(0);
  });

  it('weighs a spur by how long it was there', () => {
    const quiet = { ...KNOWN, harmonics: {}, noiseDbc: -90 };
    const [first] = stretchesOf({ ...quiet, spur: { frequencyHz: 7777.7, dbc: -40 } }, 1);
    const [, second, third, fourth] = stretchesOf(quiet, 4);
    const combined = combineToneFigures([first!, second!, third!, fourth!]);
    expect(Math.abs(combined.sfdrDb! - (40 + 10 * Math.log10(4)))).toBeLessThan(0.02);
  });

  it('is the stretch itself for a single one', () => {
    const [only] = stretchesOf(KNOWN, 1);
    expect(combineToneFigures([only!], { band: { fromHz: 20, toHz: 20_000 } })).toEqual(only);
  });

  it('refuses nothing', () => {
    expect(() => combineToneFigures([])).toThrow(RangeError);
  });
});
