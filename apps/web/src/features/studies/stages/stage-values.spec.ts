import { circuitKinds } from '@overtally/dsp';
import { describe, expect, it } from 'vitest';
import { positionOf, scaleAbout, valueAt } from './slider-scale.js';
import { numbersText, readNumbers, readRoots, readValue, rootsText, valueText } from './value-text.js';

const [inductance] = circuitKinds['lc-low-pass'].parameters;
const load = circuitKinds['lc-low-pass'].parameters.find(({ symbol }) => symbol === 'RLoad');

describe('a value of a stage', () => {
  it.each([
    ['4.7 mH', 4.7e-3],
    ['4,7mH', 4.7e-3],
    ['1e-3', 1e-3],
  ])('is read from %s', (text, value) => expect(readValue(text, inductance!).value).toBe(value));

  it('is refused with the reason', () => {
    expect(readValue('4.7 µF', inductance!).problem).toMatch(/unit F/);
    expect(readValue('0', inductance!).problem).toMatch(/greater than 0/);
    expect(readValue('', inductance!).problem).toMatch(/Needed/);
  });

  it('may be left out where there is a default', () => {
    expect(readValue('', load!)).toEqual({ value: undefined, problem: null });
    expect(readValue('2k2', load!).value).toBe(2200);
  });

  it('is written so that it reads back', () => {
    for (const value of [4.7e-3, 123.456e-6, 0.999999, 10]) {
      expect(readValue(valueText(value, 'H'), inductance!).value).toBeCloseTo(value, 12);
    }
  });
});

describe('a slider', () => {
  it('spans three decades about a positive value and finds it again', () => {
    const scale = scaleAbout(4.7e-3, true);
    expect([scale.from, scale.to]).toEqual([1e-4, 1e-1]);
    for (const value of [1e-4, 4.7e-3, 1e-1]) {
      // A step is 10^(3/300), 2.3 %.
      expect(Math.abs(valueAt(positionOf(value, scale), scale) / value - 1)).toBeLessThan(0.012);
    }
  });

  it('is linear about values that may be negative or zero', () => {
    expect(scaleAbout(-2, false)).toMatchObject({ scale: 'linear', from: -4, to: 4 });
    expect(scaleAbout(0, true)).toMatchObject({ scale: 'linear', from: 0, to: 1 });
  });
});

describe('polynomials and roots', () => {
  it('read back as written', () => {
    expect(readNumbers(numbersText([1e-6, -0.002, 1]))).toEqual({ values: [1e-6, -0.002, 1] });
    const roots = [
      { re: -200, im: 0 },
      { re: -50, im: 314 },
      { re: -50, im: -314 },
    ];
    expect(readRoots(rootsText(roots))).toEqual({ roots });
    expect(readRoots('-200\n-50 ± j 314')).toEqual({ roots });
  });

  it('name what is not read', () => {
    expect(readNumbers('1 x 2')).toEqual({ problem: expect.stringMatching(/“x” is no number/) });
    expect(readRoots('-1\nfoo')).toEqual({ problem: expect.stringMatching(/Line 2/) });
  });
});
