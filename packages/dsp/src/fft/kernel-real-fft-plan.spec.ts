import { describe, expect, it, vi } from 'vitest';
import { seededNoise } from '../../test/seeded-noise.js';
import { createKernel } from '../wasm/kernel.js';
import { createKernelRealFftPlan } from './kernel-real-fft-plan.js';
import { createPlainRealFftPlan } from './plain-real-fft-plan.js';
import { createPlanCache } from './plan-cache.js';
import { radicesOf, convenientLength } from './radices.js';
import type { RealFftPlan } from './real-fft-plan.js';

// Every radix as a first, middle and last pass, odd numbers of blocks, odd halves, odd lengths, chirps of both parities.
const LENGTHS = [
  ...[16, 18, 20, 22, 24, 26, 28, 32, 36, 40, 48, 60, 64, 96, 120, 128, 180, 252, 384, 1320, 2048, 4620],
  ...[17, 27, 33, 45, 49, 75, 91, 97, 1155, 3375, 202, 206, 404, 2 * 97, 101, 103, 1009, 2018, 4036],
];

describe('createKernelRealFftPlan', () => {
  it.each(LENGTHS)('gives the lines of the plain transform for length %i', (length) => {
    const samples = seededNoise(length + 5, length);
    const plain = lines(createPlainRealFftPlan(length), samples);
    const compiled = lines(createKernelRealFftPlan(createKernel()!, length), samples);
    const scale = Math.sqrt(length);
    compiled.forEach((value, k) => expect(Math.abs(value - plain[k]!) / scale).toBeLessThan(1e-13));
  });
});

function lines(plan: RealFftPlan, samples: Float64Array): Float64Array {
  const re = new Float64Array(plan.lineCount);
  const im = new Float64Array(plan.lineCount);
  plan.forward(samples, re, im);
  plan.forward(samples, re, im, 5);
  return Float64Array.of(...re, ...im);
}

describe('createRealFftPlan', () => {
  it('keeps to plain code where there is no WebAssembly', async () => {
    vi.stubGlobal('WebAssembly', undefined);
    vi.resetModules();
    const { createRealFftPlan } = await import('./real-fft-plan.js');
    const plan = createRealFftPlan(64);
    vi.unstubAllGlobals();
    expect(lines(plan, seededNoise(70, 1))).toEqual(lines(createPlainRealFftPlan(64), seededNoise(70, 1)));
  });
});

describe('createKernel', () => {
  it('is not there where a content security policy refuses to compile', async () => {
    const Module = function () {
      throw new EvalError('refused by the content security policy');
    };
    vi.stubGlobal('WebAssembly', { validate: () => true, Module });
    vi.resetModules();
    const { createKernel } = await import('../wasm/kernel.js');
    expect(createKernel()).toBeNull();
    vi.unstubAllGlobals();
  });

  it('is not there without SIMD', async () => {
    vi.stubGlobal('WebAssembly', { validate: () => false });
    vi.resetModules();
    const { createKernel } = await import('../wasm/kernel.js');
    expect(createKernel()).toBeNull();
    vi.unstubAllGlobals();
  });
});

describe('createPlanCache', () => {
  it('gives a plan again, and forgets the one not used for the longest time', () => {
    const cache = createPlanCache<object>();
    const made = new Map<number, object>();
    const ask = (length: number) => {
      const plan = cache.get(`${length}`, length, () => ({}));
      const known = made.get(length) === plan;
      made.set(length, plan);
      return known;
    };
    for (let length = 1; length <= 12; length++) ask(length);
    expect(ask(1)).toBe(true);
    ask(13);
    expect(ask(2)).toBe(false);
    expect(ask(1)).toBe(true);
  });

  it('keeps long plans one at a time', () => {
    const cache = createPlanCache<object>();
    const first = cache.get('long', 2 ** 21, () => ({}));
    expect(cache.get('long', 2 ** 21, () => ({}))).toBe(first);
    cache.get('short', 16, () => ({}));
    expect(cache.get('long', 2 ** 21, () => ({}))).not.toBe(first);
  });
});

describe('lengths', () => {
  it('are split into radices', () => {
    expect(radicesOf(3 * 8 * 25 * 97)).toEqual([4, 2, 3, 5, 5, 97]);
    expect(radicesOf(2 * 101)).toBeNull();
  });

  it.each([5, 17, 1000, 16_008, 20_011, 65_537])('at or above %i are convenient', (minimum) => {
    const length = convenientLength(minimum);
    expect(length).toBeGreaterThanOrEqual(minimum);
    expect(length % 4).toBe(0);
    expect(Math.max(...radicesOf(length)!)).toBeLessThanOrEqual(5);
  });
});
