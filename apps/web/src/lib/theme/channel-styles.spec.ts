import { describe, expect, it } from 'vitest';
import { channelStyles } from './channel-styles.js';
import { dark, light } from './palette.js';

type Triple = [number, number, number];

/** sRGB to linear light (IEC 61966-2-1). */
const linear = (hex: string) =>
  [1, 3, 5].map((at) => {
    const value = parseInt(hex.slice(at, at + 2), 16) / 255;
    return value <= 0.04045 ? value / 12.92 : ((value + 0.055) / 1.055) ** 2.4;
  }) as Triple;

/** Severity 1.0 of Machado, Oliveira, Fernandes: A physiologically-based model for simulation of color vision deficiency, 2009. */
const deficiencies: Record<string, Triple[]> = {
  none: [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ],
  protanopia: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deuteranopia: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritanopia: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
};

const seen = (rgb: Triple, matrix: Triple[]) =>
  matrix.map((row) =>
    Math.min(1, Math.max(0, row[0] * rgb[0] + row[1] * rgb[1] + row[2] * rgb[2])),
  ) as Triple;

const luminance = ([r, g, b]: Triple) => 0.2126 * r + 0.7152 * g + 0.0722 * b;

/** CIELAB under D65 (ISO/CIE 11664-4). */
function lab([r, g, b]: Triple): Triple {
  const f = (t: number) => (t > 216 / 24389 ? Math.cbrt(t) : (24389 / 27) * (t / 116) + 16 / 116);
  const x = f((0.4124 * r + 0.3576 * g + 0.1805 * b) / 0.9505);
  const y = f(luminance([r, g, b]));
  const z = f((0.0193 * r + 0.1192 * g + 0.9505 * b) / 1.089);
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)];
}

/** Contrast ratio of WCAG 2.2. */
function contrast(a: string, b: string): number {
  const [low = 0, high = 0] = [luminance(linear(a)), luminance(linear(b))].toSorted((x, y) => x - y);
  return (high + 0.05) / (low + 0.05);
}

const pairs = channelStyles.flatMap((a, i) => channelStyles.slice(i + 1).map((b) => [a, b] as const));

describe('styles of overlaid channels', () => {
  it('are twelve, with each pair of dash and marker standing once and no marker twice', () => {
    expect(channelStyles).toHaveLength(12);
    expect(new Set(channelStyles.map(({ dash, symbol }) => `${dash} ${symbol}`)).size).toBe(12);
    expect(new Set(channelStyles.map(({ symbol }) => symbol)).size).toBe(12);
  });

  it('stand out from the sheet (WCAG 2.2, 1.4.11: 3:1)', () => {
    for (const style of channelStyles) {
      expect(contrast(style.light, light.sheet)).toBeGreaterThan(3);
      expect(contrast(style.dark, dark.sheet)).toBeGreaterThan(3);
    }
  });

  // A CIE 1976 difference of 2.3 is about the smallest that is noticed; twice that is asked for.
  it.each(Object.keys(deficiencies))('differ in hue or lightness with colour deficiency: %s', (name) => {
    const matrix = deficiencies[name]!;
    for (const theme of ['light', 'dark'] as const) {
      for (const [a, b] of pairs) {
        const [p, q] = [a, b].map((style) => lab(seen(linear(style[theme]), matrix))) as [Triple, Triple];
        expect(Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]), `${a[theme]} ${b[theme]}`).toBeGreaterThan(
          4.6,
        );
      }
    }
  });
});
