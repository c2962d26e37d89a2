import { describe, expect, it } from 'vitest';
import { frequencyTrack } from '../fundamental/frequency-track.js';
import { amplitudeSpectrum } from '../spectrum/amplitude-spectrum.js';
import { dcHeavyFlag } from './dc-heavy.js';
import { createFlagScan, type FlagScanOptions } from './flag-scan.js';
import { frequencyDriftFlag } from './frequency-drift.js';
import { lowResolutionFlag } from './low-resolution.js';
import { nearNyquistFlag } from './near-nyquist.js';
import { notSynchronousFlag } from './not-synchronous.js';
import { orderBeyondNyquistFlag } from './order-beyond-nyquist.js';
import { recordLengthFlag } from './record-length.js';

const RATE = 10_000;
const record = (count: number, value: (t: number) => number) =>
  Float64Array.from({ length: count }, (_, n) => value(n / RATE));
const turn = (cycles: number) => Math.cos(2 * Math.PI * cycles);

function scan(samples: Float64Array, options?: FlagScanOptions) {
  const pass = createFlagScan(options);
  pass.push(samples, 0);
  return pass.finish();
}

describe('evidence of a flag', () => {
  // f(t) = 49.4 Hz + 0.6 Hz/s·t: within 2 s it passes from 49.4 Hz to 50.6 Hz; beyond 0.1 Hz around 50 Hz for 5/6 of it.
  it('of a drift is how far the frequency moved, and when it was away', () => {
    const track = frequencyTrack(
      record(20_000, (t) => turn(49.4 * t + 0.3 * t * t)),
      RATE,
      50,
    )!;
    const { evidence } = frequencyDriftFlag(track, 50, RATE)!;
    expect(evidence!.value).toBeCloseTo(1.2 - 2 * 0.09, 1);
    expect(evidence).toMatchObject({ limit: 0.2, unit: 'Hz' });
    expect(evidence!.count / track.localHz.length).toBeCloseTo(5 / 6, 1);
    expect(evidence!.timesS[0]).toBeCloseTo(0.15, 3);
  });

  it('of content near half the sample rate is its share of the fundamental', () => {
    const samples = record(10_000, (t) => turn(50 * t) + 0.05 * turn(4700 * t) + 0.5 * turn(4400 * t));
    const spectrum = amplitudeSpectrum(samples, RATE, { window: 'hann', segmentLength: 10_000 });
    const { evidence } = nearNyquistFlag(spectrum, RATE, Math.SQRT1_2)!;
    expect(evidence!.value).toBeCloseTo(5, 3);
    expect(evidence).toMatchObject({ limit: 1, unit: '%' });
  });

  it('of a heavy DC component is its share of the AC rms', () => {
    expect(dcHeavyFlag(-3, 2, 'V')!.evidence).toMatchObject({ value: 150, limit: 50, unit: '%' });
    expect(dcHeavyFlag(0.9, 2, 'V')).toBeNull();
  });

  it('of a short record is the number of cycles it holds', () => {
    expect(recordLengthFlag(0.126, 50)!.evidence).toMatchObject({ value: 6.3, limit: 10, unit: 'cycles' });
    expect(recordLengthFlag(0.015, 50)!.evidence).toMatchObject({ value: 0.75, limit: 1 });
    expect(recordLengthFlag(0.2, 50)).toBeNull();
  });

  it('of missing orders is the highest one against half the sample rate', () => {
    expect(orderBeyondNyquistFlag(50, 39, 50, 4000)!.evidence).toMatchObject({
      count: 11,
      value: 2500,
      limit: 2000,
      unit: 'Hz',
    });
  });
});

// A sine over C steps has an rms of C/(2√2) steps, an ideal quantiser a noise of 1/√12: together √(2/3)/C.
describe('a coarse converter step', () => {
  const coded = (halfSpan: number) => record(20_000, (t) => Math.round(halfSpan * turn(50.3 * t)) / 128);

  it('is one whose noise exceeds 1 % of the AC rms', () => {
    const flag = lowResolutionFlag(scan(coded(35)), 35 / 128 / Math.SQRT2)!;
    expect(flag.evidence!.value).toBeCloseTo((100 * Math.sqrt(2 / 3)) / 70, 6);
    expect(flag.evidence).toMatchObject({ limit: 1, unit: '%' });
    expect(flag.message).toContain('spans only 71 codes');
    expect(lowResolutionFlag(scan(coded(42)), 42 / 128 / Math.SQRT2)).toBeNull();
  });

  it('is not read into a signal of few levels, unless the converter is known to be nearly idle', () => {
    const levels = record(20_000, (t) => Math.round(2 * turn(50 * t)));
    expect(lowResolutionFlag(scan(levels), 1.4)).toBeNull();
    const wide = { lowestCode: -32_768, highestCode: 32_767 };
    expect(lowResolutionFlag(scan(levels, wide), 1.4)!.message).toContain('spans only 5 codes');
  });

  it('is not read into samples that lie on no grid', () => {
    expect(lowResolutionFlag(scan(record(5000, (t) => turn(50.3 * t))), 0.7)).toBeNull();
  });
});

// IEC 61000-4-7, 4.4.1: ±0.03 %.
describe('windows that miss whole cycles', () => {
  it('are counted beyond 0.03 %', () => {
    const windows = { starts: [0, 2000, 4000, 6000], errorPercent: [0.029, -0.05, 0.031, 0] };
    expect(notSynchronousFlag(windows, RATE)!.evidence).toEqual({
      count: 2,
      timesS: [0.2, 0.4],
      value: 0.05,
      limit: 0.03,
      unit: '%',
    });
    expect(notSynchronousFlag({ starts: [0, 2000], errorPercent: [0.03, -0.03] }, RATE)).toBeNull();
    expect(notSynchronousFlag(null, RATE)).toBeNull();
  });
});
