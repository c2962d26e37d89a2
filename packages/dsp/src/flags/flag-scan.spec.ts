import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { badRanges } from './bad-ranges.js';
import { clippedFlag } from './clipped.js';
import { adcSaturatedFlag } from './adc-saturated.js';
import { discontinuityFlag } from './discontinuity.js';
import { createFlagScan, type FlagScanOptions, type ScanFindings } from './flag-scan.js';

const RATE = 10_000;

function scan(samples: Float64Array, options?: FlagScanOptions, sizes: number[] = [4096]): ScanFindings {
  const pass = createFlagScan(options);
  for (let first = 0, i = 0; first < samples.length; i++) {
    const block = samples.subarray(first, first + sizes[i % sizes.length]!);
    pass.push(block, first);
    first += block.length;
  }
  return pass.finish();
}

const wave = (count: number, value: (cycles: number, n: number) => number, frequencyHz = 50) =>
  Float64Array.from({ length: count }, (_, n) => value((frequencyHz * n) / RATE, n));
const sine = (cycles: number) => Math.sin(2 * Math.PI * cycles);
const limited = (x: number, limit: number) => Math.max(-limit, Math.min(limit, x));

/** Ranges of successive samples with |x| ≥ level, counted one by one. */
function rangesAt(samples: Float64Array, level: number): { start: number; end: number }[] {
  const out: { start: number; end: number }[] = [];
  samples.forEach((x, n) => {
    if (Math.abs(x) < level) return;
    const last = out[out.length - 1];
    if (last?.end === n) last.end = n + 1;
    else out.push({ start: n, end: n + 1 });
  });
  return out;
}

describe('flat crests', () => {
  // A sine limited at 0.8 of its peak has two limited crests a cycle; 0.2952 of the samples are at the limit
  // (1 − 2 asin(0.8)/π·…: the share of angles with |sin| > 0.8 is 1 − 2 asin(0.8)/π = 0.4097).
  it('are counted at both ends of a limited sine, with times, and all of them are bad', () => {
    const samples = wave(12_000, (c) => limited(sine(c), 0.8), 50.03);
    const findings = scan(samples);
    const flag = clippedFlag(findings, RATE)!;
    const ranges = rangesAt(samples, 0.8);
    expect(ranges).toHaveLength(120);
    expect(flag.evidence).toMatchObject({ count: 120, value: 41, limit: 3, unit: 'samples' });
    expect(flag.evidence!.timesS).toEqual(ranges.slice(0, 20).map((range) => range.start / RATE));
    const bad = badRanges(findings, RATE, 50.03);
    expect(bad).toHaveLength(120);
    // The sample before may lie a hair below the limit.
    bad.forEach(({ start, end }, i) => {
      expect(ranges[i]!.start - start).toBeOneOf([0, 1]);
      expect(end - ranges[i]!.end).toBeOneOf([0, 1]);
    });
    const share = ranges.reduce((sum, { start, end }) => sum + end - start, 0) / samples.length;
    expect(share).toBeCloseTo(1 - (2 * Math.asin(0.8)) / Math.PI, 3);
  });

  // 200 samples a cycle exactly: no sample near the limit that would betray a converter step.
  it('are seen where every cycle has the same samples', () => {
    expect(clippedFlag(scan(wave(2000, (c) => limited(sine(c), 0.8))), RATE)!.evidence!.count).toBe(20);
  });

  it('at a level that is exceeded later are dropped', () => {
    const samples = wave(4000, (c, n) => limited((n < 2000 ? 1 : 2) * sine(c), n < 2000 ? 0.8 : 1.5));
    for (const sizes of [[4096], [450]]) {
      const { evidence } = clippedFlag(scan(samples, {}, sizes), RATE)!;
      expect(evidence!.count).toBe(20);
      expect(evidence!.timesS[0]).toBeGreaterThan(0.2);
    }
    samples[3999] = 3;
    samples[3998] = -3;
    expect(clippedFlag(scan(samples), RATE)).toBeNull();
  });

  it('count from where the new level begins when a plateau below comes first', () => {
    // A plateau of 100 samples at 0.8 leads to one of 30 at 1, twice, after a block that knows only 0.8.
    const plateaus = wave(1400, (c, n) => {
      const place = (n - 500) % 400;
      if (n < 500 || place >= 130) return limited(sine(c), 0.79) + 0.01 * sine(c);
      return place < 100 ? 0.8 : 1;
    });
    const { evidence } = clippedFlag(scan(plateaus, {}, [500]), RATE)!;
    expect(evidence).toMatchObject({ count: 2, value: 30, timesS: [0.06, 0.1] });
  });

  it.each([
    ['a sine in 8 bits', (c: number) => Math.round(127 * sine(c)) / 128],
    ['a sine in 5 significant digits', (c: number) => Number((1.2345 * sine(c)).toPrecision(5))],
    [
      'a sine in 4 significant digits beside a power of ten',
      (c: number) => Number((1.05 * sine(c)).toPrecision(4)),
    ],
    ['a maximally flat mixture of orders 1 and 3', (c: number) => sine(c) + sine(3 * c) / 9],
    ['the same in 10 bits', (c: number) => Math.round(500 * (sine(c) + sine(3 * c) / 9)) / 512],
  ])('are not seen in %s', (_, value) => {
    for (const frequencyHz of [5, 17.3, 50]) {
      expect(clippedFlag(scan(wave(20_000, value, frequencyHz)), RATE)).toBeNull();
    }
  });

  it('are seen in a limited sine in 8 bits', () => {
    const samples = wave(2000, (c) => Math.round(100 * limited(sine(c), 0.8)) / 128);
    expect(clippedFlag(scan(samples), RATE)!.evidence!.count).toBe(20);
  });

  it('are not seen in the pauses of a rectified sine', () => {
    expect(clippedFlag(scan(wave(4000, (c) => Math.max(0, sine(c)))), RATE)).toBeNull();
  });
});

describe('a scan in blocks', () => {
  const noise = seededNoise(6000, 5);
  const records: [string, Float64Array][] = [
    ['a limited sine', wave(6000, (c) => limited(sine(c), 0.7), 49.7)],
    ['a noisy limited sine', wave(6000, (c, n) => limited(sine(c) + 0.01 * noise[n]!, 0.7), 49.7)],
    ['a sine in 8 bits', wave(6000, (c) => limited(Math.round(150 * sine(c)), 127))],
    ['a sine with lost samples', wave(6000, (c, n) => sine(c + (n > 2500 ? 0.3 : 0) + (n > 4000 ? 0.2 : 0)))],
  ];

  it.each(records)('finds the same in %s whatever the blocks', (_, samples) => {
    const ends = { lowestCode: -128, highestCode: 127 };
    const whole = scan(samples, ends, [samples.length]);
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 400, max: 3000 }), { minLength: 1, maxLength: 9 }), (sizes) => {
        const parts = scan(samples, ends, sizes);
        expect(parts).toEqual(whole);
        expect(badRanges(parts, RATE, 50)).toEqual(badRanges(whole, RATE, 50));
      }),
      { seed: 3, numRuns: 40 },
    );
  });

  it('counts a run over a boundary once', () => {
    const samples = wave(2000, (c) => limited(sine(c), 0.8));
    const top = rangesAt(samples, 0.8)[4]!;
    const inTheMiddle = (top.start + top.end) >> 1;
    expect(scan(samples, {}, [inTheMiddle, 5000])).toEqual(scan(samples));
  });

  it('refuses a block that leaves samples out', () => {
    const pass = createFlagScan();
    pass.push(new Float64Array(10), 0);
    expect(() => pass.push(new Float64Array(10), 11)).toThrow(RangeError);
  });

  it('keeps the number of bad ranges bounded, and all bad samples in them', () => {
    const samples = wave(400_000, (c) => limited(sine(c), 0.8), 500);
    const bad = rangesAt(samples, 0.8);
    expect(bad.length).toBe(40_000);
    const ranges = badRanges(scan(samples), RATE, 500);
    expect(ranges.length).toBeLessThanOrEqual(4096);
    const covered = bad.filter(({ start, end }) =>
      ranges.some((range) => range.start <= start && end <= range.end),
    );
    expect(covered.length).toBe(bad.length);
  });
});

describe('saturated runs', () => {
  it('are counted at both end codes, not single samples there', () => {
    const samples = Float64Array.from([0, 5, 127, 127, 3, 127, 0, -128, -128, -128, 1, 127, 127]);
    const flag = adcSaturatedFlag(scan(samples, { lowestCode: -128, highestCode: 127 }), 10)!;
    expect(flag.evidence).toEqual({ count: 3, timesS: [0.2, 0.7, 1.1], value: 3, limit: 2, unit: 'samples' });
    expect(flag.message).toContain('highest code for 4 samples in 2 runs');
    expect(flag.message).toContain('lowest code for 3 samples in 1 runs');
  });

  it('need the ends of the converter, in any order', () => {
    const samples = Float64Array.from([0, 1, 1, 0, -1, -1]);
    expect(adcSaturatedFlag(scan(samples), 1)).toBeNull();
    expect(adcSaturatedFlag(scan(samples, { lowestCode: 1, highestCode: -1 }), 1)!.evidence!.count).toBe(2);
  });
});

describe('jumps', () => {
  const jumping = (count: number, places: number[]) =>
    wave(count, (c, n) => sine(c + 0.3 * places.filter((at) => n >= at).length));

  it('are found at every place, up to twenty', () => {
    const places = [1003, 3210, 5555, 8191, 8192 + 4, 12_000, 17_777];
    const flag = discontinuityFlag(scan(jumping(20_000, places)), RATE, 50, 'V')!;
    expect(flag.evidence!.count).toBe(7);
    expect(flag.evidence!.unit).toBe('V');
    flag.evidence!.timesS.forEach((t, i) => expect(Math.abs(t * RATE - places[i]!)).toBeLessThanOrEqual(2));
    expect(flag.evidence!.value!).toBeGreaterThan(flag.evidence!.limit!);
  });

  it('that recur every half cycle belong to the signal, however short the record', () => {
    const dimmer = (count: number) => wave(count, (c) => ((2 * c) % 1 > 0.5 ? sine(c) : 0));
    for (const count of [150, 350, 1000, 5000]) {
      expect(discontinuityFlag(scan(dimmer(count)), RATE, 50, 'A')).toBeNull();
    }
  });

  it('are marked as bad with the samples that tell of them', () => {
    expect(badRanges(scan(jumping(4000, [1500])), RATE, 50)).toEqual([
      { start: expect.closeTo(1498, -1), end: expect.closeTo(1502, -1) },
    ]);
  });

  it('are not seen in noise, a chirp or an impulse train', () => {
    expect(discontinuityFlag(scan(seededNoise(50_000, 9)), RATE, null, 'V')).toBeNull();
    expect(discontinuityFlag(scan(wave(50_000, (c) => sine(c * (1 + c / 500)))), RATE, 50, 'V')).toBeNull();
    expect(
      discontinuityFlag(scan(wave(50_000, (_, n) => (n % 200 === 7 ? 1 : 0))), RATE, 50, 'V'),
    ).toBeNull();
  });
});
