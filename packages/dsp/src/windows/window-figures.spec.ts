import { describe, expect, it } from 'vitest';
import { windowFigures } from './window-figures.js';
import { windowSamples, type WindowName } from './window-samples.js';

describe('windowFigures', () => {
  // F. J. Harris, Proc. IEEE 66(1), 1978, table 1 (CG and ENBW, two digits there); four digits computed independently from
  // the printed coefficients. Nuttall 1981; flat-top: common library form.
  it.each<[WindowName, number, number]>([
    ['rectangular', 1, 1],
    ['hann', 0.5, 1.5],
    ['hamming', 0.54, 1.3628],
    ['blackman', 0.42, 1.7268],
    ['blackman-harris', 0.3588, 2.0044],
    ['nuttall', 0.3636, 1.9761],
    ['flat-top', 0.2156, 3.7702],
  ])('%s', (name, coherentGain, enbwBins) => {
    const figures = windowFigures(windowSamples(name, 1024));
    expect(figures.coherentGain).toBeCloseTo(coherentGain, 4);
    expect(figures.enbwBins).toBeCloseTo(enbwBins, 4);
  });

  // Kaiser-Bessel rows of the same table, β = πα.
  it.each([
    [2, 0.4892, 1.4963],
    [2.5, 0.4396, 1.6519],
    [3, 0.4025, 1.7952],
    [3.5, 0.3735, 1.9284],
  ])('kaiser alpha %d', (alpha, coherentGain, enbwBins) => {
    const figures = windowFigures(windowSamples('kaiser', 1024, Math.PI * alpha));
    expect(figures.coherentGain).toBeCloseTo(coherentGain, 3);
    expect(figures.enbwBins).toBeCloseTo(enbwBins, 2);
  });

  it('is periodic: the sample after the last one would be the first', () => {
    const w = windowSamples('hann', 8);
    expect(w[0]).toBe(0);
    expect(w[4]).toBe(1);
    expect(w[7]).toBeCloseTo(w[1]!, 15);
  });
});
