import { describe, expect, it } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { countedFrequency } from './counted-frequency.js';
import { frequencyTrack } from './frequency-track.js';

const RATE = 5000;
const TWO_PI = 2 * Math.PI;

/** A wave whose fundamental has turned by `cycles(t)` since the first sample. */
const record = (
  seconds: number,
  value: (cycles: number, n: number) => number,
  cycles: (t: number) => number,
) => Float64Array.from({ length: Math.round(seconds * RATE) }, (_, n) => value(cycles(n / RATE), n));
const counted = (samples: Float64Array, carrierHz: number) =>
  countedFrequency(frequencyTrack(samples, RATE, carrierHz)!, RATE, samples.length);
const cosine = (cycles: number) => Math.cos(TWO_PI * cycles);

/** IEC 61000-4-30, 5.1.1 word by word: rising crossings of the fundamental alone, found in its known phase. */
function byCrossings(cyclesAt: (t: number) => number, from: number, to: number) {
  const at = (whole: number) => {
    let [low, high] = [from, to];
    for (let i = 0; i < 80; i++) {
      const middle = (low + high) / 2;
      if (cyclesAt(middle) + 0.25 < whole) low = middle;
      else high = middle;
    }
    return low;
  };
  const first = Math.ceil(cyclesAt(from) + 0.25);
  const last = Math.floor(cyclesAt(to) + 0.25);
  return { cycles: last - first, frequencyHz: (last - first) / (at(last) - at(first)) };
}

describe('frequency by counted cycles', () => {
  it('counts whole cycles of a steady wave in each whole interval of 10 s', () => {
    const result = counted(
      record(35, cosine, (t) => 49.97 * t + 0.1),
      49.97,
    );
    expect(result.map(({ startS }) => startS)).toEqual([0, 10, 20]);
    for (const { frequencyHz, cycles } of result) {
      expect(Math.abs(frequencyHz - 49.97)).toBeLessThan(1e-7);
      // 499.7 cycles in 10 s: 499 whole ones, 498 where the interval begins behind a crossing.
      expect([498, 499]).toContain(cycles);
    }
  });

  // IEC 61000-4-30, table of class A: ±10 mHz, with the harmonics of 5.1.1 and noise on top.
  it('is not misled by harmonics, interharmonics, DC and noise', () => {
    const noise = seededNoise(20 * RATE, 4);
    const samples = record(
      20,
      (c, n) =>
        cosine(c) +
        0.3 * cosine(3 * c + 0.2) +
        0.5 * cosine(5 * c) +
        0.2 * cosine(2.6 * c) +
        0.4 +
        0.05 * noise[n]!,
      (t) => 49.97 * t,
    );
    for (const { frequencyHz } of counted(samples, 49.97)) {
      expect(Math.abs(frequencyHz - 49.97)).toBeLessThan(1e-3);
    }
  });

  it('does not depend on the carrier being the exact frequency', () => {
    const samples = record(
      20,
      (c) => cosine(c) + 0.2 * cosine(3 * c),
      (t) => 60.02 * t,
    );
    for (const { frequencyHz } of counted(samples, 60))
      expect(Math.abs(frequencyHz - 60.02)).toBeLessThan(5e-4);
  });

  it.each([
    ['a slow chirp', (t: number) => 49.9 * t + 0.005 * t * t],
    ['a fast chirp', (t: number) => 48 * t + 0.05 * t * t],
    ['a swinging frequency', (t: number) => 50 * t - (0.3 / (TWO_PI * 0.2)) * Math.cos(TWO_PI * 0.2 * t)],
  ])('agrees with crossings counted one by one in %s', (_, cycles) => {
    const samples = record(20, cosine, cycles);
    const result = counted(samples, cycles(20) / 20);
    expect(result).toHaveLength(2);
    result.forEach(({ startS, frequencyHz, cycles: count }) => {
      const expected = byCrossings(cycles, startS, startS + 10);
      expect(Math.abs(frequencyHz - expected.frequencyHz)).toBeLessThan(1e-3);
      expect(count).toBe(expected.cycles);
    });
  });

  it('gives nothing for less than 10 s, and nothing for an interval without a fundamental', () => {
    expect(
      counted(
        record(9.9, cosine, (t) => 50 * t),
        50,
      ),
    ).toEqual([]);
    const interrupted = record(30, cosine, (t) => 50 * t);
    interrupted.fill(0, 14 * RATE, 15 * RATE);
    expect(counted(interrupted, 50).map(({ startS }) => startS)).toEqual([0, 20]);
  });
});
