import { describe, expect, it } from 'vitest';
import { windowFigures } from './window-figures.js';
import { amplitudeCorrection, powerCorrection } from './window-gains.js';
import { windowSamples, type WindowName } from './window-samples.js';

/**
 * F. J. Harris, "On the use of windows for harmonic analysis with the discrete Fourier transform", Proc. IEEE 66(1),
 * 1978, table 1: coherent gain, equivalent noise bandwidth (bins), scallop loss (dB), highest side lobe (dB) as printed.
 */
const SURVEY: [string, WindowName, number | undefined, number, number, number, number][] = [
  ['rectangle', 'rectangular', undefined, 1.0, 1.0, 3.92, -13],
  ['Hanning α = 2', 'hann', undefined, 0.5, 1.5, 1.42, -32],
  ['Hamming', 'hamming', undefined, 0.54, 1.36, 1.78, -43],
  ['Blackman', 'blackman', undefined, 0.42, 1.73, 1.1, -58],
  ['minimum 4-sample Blackman-Harris', 'blackman-harris', undefined, 0.36, 2.0, 0.83, -92],
  ['Kaiser-Bessel α = 2.0', 'kaiser', 2.0, 0.49, 1.5, 1.46, -46],
  ['Kaiser-Bessel α = 2.5', 'kaiser', 2.5, 0.44, 1.65, 1.2, -57],
  ['Kaiser-Bessel α = 3.0', 'kaiser', 3.0, 0.4, 1.8, 1.02, -69],
  ['Kaiser-Bessel α = 3.5', 'kaiser', 3.5, 0.37, 1.93, 0.89, -82],
];

describe('windowFigures against the survey of Harris', () => {
  it.each(SURVEY)('%s', (_, name, alpha, coherentGain, enbwBins, scallopLossDb, highestSidelobeDb) => {
    const beta = alpha === undefined ? undefined : Math.PI * alpha;
    const figures = windowFigures(windowSamples(name, 1024, beta));
    expect(Math.abs(figures.coherentGain - coherentGain)).toBeLessThan(0.006);
    expect(Math.abs(figures.enbwBins - enbwBins)).toBeLessThan(0.006);
    // The survey worked on 50 to 100 samples; the last printed digit moves by up to 3.
    expect(Math.abs(figures.scallopLossDb - scallopLossDb)).toBeLessThan(0.035);
    expect(Math.abs(figures.highestSidelobeDb - highestSidelobeDb)).toBeLessThan(1);
  });
});

describe('windowFigures of later windows', () => {
  // A. H. Nuttall, IEEE Trans. ASSP-29(1), 1981: −98.17 dB for the minimum four-term window. Flat-top: common practice, the
  // five-term form of the numerical libraries (scipy 1.10.1, signal.windows.flattop: side lobe −93.03 dB by numpy 1.24.2).
  it.each<[WindowName, number, number, number, number]>([
    ['nuttall', 0.3636, 1.9761, 0.851, -98.17],
    ['flat-top', 0.2156, 3.7702, 0.0098, -93.0],
  ])('%s', (name, coherentGain, enbwBins, scallopLossDb, highestSidelobeDb) => {
    const figures = windowFigures(windowSamples(name, 1024));
    expect(figures.coherentGain).toBeCloseTo(coherentGain, 4);
    expect(figures.enbwBins).toBeCloseTo(enbwBins, 4);
    expect(figures.scallopLossDb).toBeCloseTo(scallopLossDb, 3);
    expect(Math.abs(figures.highestSidelobeDb - highestSidelobeDb)).toBeLessThan(0.05);
  });

  // Closed form for many samples: the rectangular window has sin(πδ)/πδ, so 2/π at half a bin.
  it('rectangular scallop loss is 20 log10(π/2)', () => {
    const { scallopLossDb } = windowFigures(windowSamples('rectangular', 8192));
    expect(scallopLossDb).toBeCloseTo(20 * Math.log10(Math.PI / 2), 5);
  });
});

describe('corrections', () => {
  // Closed forms of the Hann window: mean ½, mean square 3/8.
  it('are the reciprocals of mean and mean square', () => {
    const hann = windowSamples('hann', 512);
    expect(amplitudeCorrection(hann)).toBeCloseTo(2, 12);
    expect(powerCorrection(hann)).toBeCloseTo(8 / 3, 12);
  });
});

describe('windowSamples', () => {
  it('is periodic: the sample after the last one would be the first', () => {
    const w = windowSamples('hann', 8);
    expect(w[0]).toBe(0);
    expect(w[4]).toBe(1);
    expect(w[7]).toBeCloseTo(w[1]!, 15);
  });

  it('holds odd and tiny lengths', () => {
    // scipy 1.10: signal.windows.hann(5, sym=False)
    const expected = [0, 0.3454915028125263, 0.9045084971874737, 0.9045084971874737, 0.3454915028125263];
    windowSamples('hann', 5).forEach((w, n) => expect(w).toBeCloseTo(expected[n]!, 14));
    expect([...windowSamples('flat-top', 1)]).toEqual([expect.closeTo(-0.000421051, 9)]);
  });

  it.each([0, -1, 2.5, NaN])('refuses the length %d', (length) => {
    expect(() => windowSamples('hann', length)).toThrow(RangeError);
  });
});
