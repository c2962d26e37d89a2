import { describe, expect, it } from 'vitest';
import { analyseRecord, type AnalysisSettings, type ChannelInput } from '../src/index.js';
import { seededNoise } from './seeded-noise.js';

const RATE = 20_000;

/** Sum of sines, given as [Hz, rms]. */
function sines(lines: [number, number][], length: number, noise = 0): Float64Array {
  const random = seededNoise(length, 21);
  return Float64Array.from({ length }, (_, n) =>
    lines.reduce(
      (sum, [hz, rms]) => sum + Math.SQRT2 * rms * Math.cos((2 * Math.PI * hz * n) / RATE + hz),
      noise * random[n]!,
    ),
  );
}

function analyse(
  samples: Float64Array,
  settings: Partial<AnalysisSettings>,
  channel: Partial<ChannelInput> = {},
) {
  const described = { index: 0, name: 'i', quantity: 'current', unit: 'A', samples, ...channel };
  return analyseRecord({
    sampleRateHz: RATE,
    channels: [described],
    settings: { profile: 'mains', nominalFrequencyHz: 50, ...settings },
  }).channels[0]!;
}

describe('what an analysis gives', () => {
  const distorted: [number, number][] = [
    [50, 10],
    [150, 1],
    [1000, 0.5],
    [2050, 0.3],
    [2150, 0.4],
  ];

  // IEC 61000-4-7, annex B: 2.05 kHz and 2.15 kHz lie in the band around 2.1 kHz; √(0.3² + 0.4²) = 0.5.
  it('lists the 200 Hz bands that half the sample rate allows', () => {
    const { bands } = analyse(sines(distorted, 40_000), {});
    expect(bands).toHaveLength(35);
    expect(bands[0]!.centreHz).toBe(2100);
    expect(bands[0]!.rms).toBeCloseTo(0.5, 8);
    expect(bands[0]!.maxRms).toBeCloseTo(0.5, 8);
    expect(bands[1]!.rms).toBeLessThan(1e-8);
  });

  // Closed forms: THD √(1² + 0.5²)/10; PWHD √(20)·0.05 from order 20 alone (IEC 61000-3-12 counts orders 14 to 40).
  it('follows the distortion over the windows', () => {
    const { distortion, series } = analyse(sines(distorted, 40_000), {});
    expect(distortion!.thd.mean).toBeCloseTo(Math.sqrt(1.25) * 10, 6);
    expect(distortion!.thds!.p99).toBeCloseTo(Math.sqrt(1.25) * 10, 6);
    expect(distortion!.pwhd!.max).toBeCloseTo(Math.sqrt(20) * 5, 6);
    expect(series!.rms[3]).toBeCloseTo(Math.sqrt(100 + 1.25 + 0.25), 8);
    expect(analyse(sines(distorted, 40_000), { maxOrder: 39 }).distortion!.pwhd).toBeNull();
  });

  // 36 segments of 4096 samples every 1024 fit into 40 000 samples; ENBW of the Hann window 1.5 lines (Harris 1978).
  it('averages the segments that are asked for', () => {
    const { spectrum } = analyse(sines(distorted, 40_000), {
      ...{ profile: 'general', segmentLength: 4096, overlapPercent: 75 },
    });
    expect(spectrum.segments).toBe(36);
    expect(spectrum.stepHz).toBe(RATE / 4096);
    expect(spectrum.noiseBandwidthHz).toBeCloseTo((1.5 * RATE) / 4096, 9);
  });

  it('draws a long mains record from a bounded number of segments over all of it', () => {
    const samples = sines([[50, 1]], 1_200_000).map((x, n) => (n < 1_100_000 ? x : 3 * x));
    const { spectrum } = analyse(samples, {});
    expect(spectrum.segments).toBe(16);
    // 1 A for 16.8 segments of 18.3, 3 A for the rest: between the two, and above what the first stretch alone gives.
    const largest = spectrum.rms.reduce((max, x) => Math.max(max, x), 0);
    expect(largest).toBeGreaterThan(1.1);
    expect(largest).toBeLessThan(2);
  });

  it('lists the largest lines and the series among them', () => {
    const { lines, families } = analyse(sines(distorted, 40_000, 0.01), {});
    expect(lines[0]!.frequencyHz).toBeCloseTo(50, 2);
    expect(lines[0]!.rms).toBeCloseTo(10, 2);
    expect(families[0]!.fundamentalHz).toBeCloseTo(50, 2);
    expect(families[0]!.orders).toEqual(expect.arrayContaining([1, 3, 20]));
  });

  // JCGM 100: 0.5 % limits are 0.5/√3 %, a calibration of 0.2 % (k = 2) is 0.1 %; doubled root of the squares.
  it('states uncertainties from what is known of the measuring chain', () => {
    const accuracy = [{ channel: 0, readingPercent: 0.5, calibrationPercent: 0.2 }];
    const result = analyse(sines(distorted, 40_000), { accuracy });
    const relative = 2 * Math.hypot(0.005 / Math.sqrt(3), 0.001);
    expect(result.uncertainty['fundamental.rms']!.expanded / (10 * relative)).toBeCloseTo(1, 3);
    expect(result.harmonics[2]!.uncertainty! / relative).toBeCloseTo(1, 3);
    expect(result.uncertainty.thdFPercent!.expanded).toBeLessThan(1e-3);
  });

  // IEEE 1241: 20 log10(½) = −6.02 dB below full scale; what misses it raises ENOB by 1 bit.
  it('refers a tone to the full scale of its format', () => {
    const tone = sines([[997, 0.5 / Math.SQRT2]], 65_536, 1e-4);
    const half = analyse(
      tone,
      { profile: 'tone', nominalFrequencyHz: 'auto', bandHz: { fromHz: 20, toHz: 5000 } },
      { lowestCode: -1, highestCode: 1 - 2 ** -15 },
    );
    expect(half.tone!.levelDbfs).toBeCloseTo(-6.0206, 3);
    expect(half.tone!.enobFullScaleBits! - half.enobBits!).toBeCloseTo(1, 3);
    expect(half.tone!.bandHz).toEqual({ fromHz: 20, toHz: 5000 });
    // White noise: about half of its power lies below 5 kHz of 10 kHz.
    expect(half.tone!.thdPlusNBandPercent! / half.thdPlusNPercent!).toBeCloseTo(Math.SQRT1_2, 1);
    expect(analyse(tone, { profile: 'tone', nominalFrequencyHz: 'auto' }).tone!.levelDbfs).toBeNull();
  });

  it('counts the cycles of each ten seconds', () => {
    const { countedFrequency } = analyse(sines([[49.987, 230]], 410_000), { maxOrder: 5 });
    expect(countedFrequency.map(({ startS }) => startS)).toEqual([0, 10]);
    countedFrequency.forEach(({ frequencyHz }) => expect(frequencyHz).toBeCloseTo(49.987, 4));
  });
});
