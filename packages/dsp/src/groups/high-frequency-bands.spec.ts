import { describe, expect, it } from 'vitest';
import { highFrequencyBand, highFrequencyBandCentres, linesForBands } from './high-frequency-bands.js';

describe('200 Hz bands of IEC 61000-4-7, annex B', () => {
  it('are the 35 between 2 kHz and 9 kHz', () => {
    const centres = highFrequencyBandCentres(50_000, 5);
    expect(centres).toHaveLength(35);
    expect([centres[0], centres[34]]).toEqual([2100, 8900]);
  });

  it('are left out where half the sample rate or the width of the lines forbids them', () => {
    expect(highFrequencyBandCentres(10_000, 5).at(-1)).toBe(4700);
    expect(highFrequencyBandCentres(18_000, 5)).toHaveLength(34);
    expect(highFrequencyBandCentres(4000, 5)).toHaveLength(0);
    expect(highFrequencyBandCentres(50_000, 25)).toHaveLength(0);
  });

  // Annex B: the lines from b − 95 Hz to b + 100 Hz in steps of 5 Hz, 40 of them.
  it.each([5, 4.995, 5.004])('hold the 40 lines of the annex, also with lines of %d Hz', (lineHz) => {
    const lines = new Float64Array(1900).fill(1);
    expect(highFrequencyBand(lines, lineHz, 2100) ** 2).toBeCloseTo(40, 9);
    const below = new Float64Array(1900);
    below[400] = 3; // 2000 Hz
    below[401] = 4; // 2005 Hz, the first line of the band
    below[440] = 12; // 2200 Hz, the last one
    below[441] = 7; // 2205 Hz, of the next band
    expect(highFrequencyBand(below, lineHz, 2100)).toBeCloseTo(Math.hypot(4, 12), 12);
    expect(highFrequencyBand(below, lineHz, 2300)).toBeCloseTo(7, 12);
  });

  it('need the lines up to 9 kHz', () => {
    expect(linesForBands(highFrequencyBandCentres(50_000, 5), 5)).toBe(1801);
    expect(linesForBands(new Float64Array(0), 5)).toBe(0);
  });
});
