import { twoLevelSeries } from '../transfer/two-level-wave.js';
import type { FourierSeries, SeriesComponent } from './types.js';

/** Waves whose Fourier series is known in closed form. */
export type TextbookShape =
  'sine' | 'square' | 'triangle' | 'sawtooth' | 'pulse' | 'half-wave' | 'full-wave' | 'six-pulse';

export interface TextbookWave {
  shape: TextbookShape;
  /** Peak value; of a pulse its height above 0. */
  amplitude: number;
  /** Of the cycle; of rectified sines that of the sine. */
  frequencyHz: number;
  /** Of a pulse, default 50. */
  dutyPercent?: number | undefined;
  maxOrder: number;
}

/**
 * Fourier series of a textbook wave in closed form (I. N. Bronshtein et al., Handbook of Mathematics, table of Fourier
 * expansions): square and pulse with the rising edge at t = 0, all others as the sine of their fundamental; `six-pulse` is
 * the line current of an ideal bridge rectifier, blocks of 120°. Orders that the wave does not hold have rms 0 and no phase.
 *
 * @throws RangeError for a frequency that is not positive or a duty that is not between 0 and 100 %
 */
export function textbookSeries(wave: TextbookWave): FourierSeries {
  const { shape, amplitude: a, frequencyHz, dutyPercent = 50, maxOrder } = wave;
  if (!(frequencyHz > 0)) throw new RangeError(`The frequency must be positive, got ${frequencyHz}`);
  switch (shape) {
    case 'square':
      return twoLevelSeries({ high: a, low: -a, duty: 0.5, frequencyHz }, maxOrder);
    case 'pulse':
      return twoLevelSeries({ high: a, low: 0, duty: dutyPercent / 100, frequencyHz }, maxOrder);
    case 'sine':
      return { frequencyHz, dc: 0, components: sines(maxOrder, (h) => (h === 1 ? a : 0)) };
    case 'triangle':
      return {
        frequencyHz,
        dc: 0,
        components: sines(maxOrder, (h) =>
          h % 2 === 0 ? 0 : ((h % 4 === 1 ? 8 : -8) * a) / (Math.PI * h) ** 2,
        ),
      };
    case 'sawtooth':
      return {
        frequencyHz,
        dc: 0,
        components: sines(maxOrder, (h) => ((h % 2 === 0 ? -2 : 2) * a) / (Math.PI * h)),
      };
    case 'six-pulse':
      return { frequencyHz, dc: 0, components: sines(maxOrder, (h) => sixPulse(h) * a) };
    case 'half-wave':
      return {
        frequencyHz,
        dc: a / Math.PI,
        components: rectified(maxOrder, a, 2).map((row) =>
          row.order === 1 ? { order: 1, rms: a / (2 * Math.SQRT2), phaseDeg: -90 } : row,
        ),
      };
    case 'full-wave':
      return { frequencyHz, dc: (2 * a) / Math.PI, components: rectified(maxOrder, a, 4) };
  }
}

/** 4/(πh) cos(hπ/6) of odd orders that are no multiples of 3. */
function sixPulse(h: number): number {
  if (h % 2 === 0 || h % 3 === 0) return 0;
  const sign = h % 12 === 1 || h % 12 === 11 ? 1 : -1;
  return (sign * 2 * Math.sqrt(3)) / (Math.PI * h);
}

/** Orders b_h sin(hωt). */
function sines(maxOrder: number, peak: (order: number) => number): SeriesComponent[] {
  return Array.from({ length: maxOrder }, (_, i) => {
    const b = peak(i + 1);
    return {
      order: i + 1,
      rms: Math.abs(b) / Math.SQRT2,
      phaseDeg: b === 0 ? null : b > 0 ? -90 : 90,
    };
  });
}

/** −factor a/(π(h² − 1)) cos(hωt) of the even orders. */
function rectified(maxOrder: number, a: number, factor: number): SeriesComponent[] {
  return Array.from({ length: maxOrder }, (_, i) => {
    const order = i + 1;
    if (order % 2 === 1) return { order, rms: 0, phaseDeg: null };
    return { order, rms: (factor * a) / (Math.PI * (order ** 2 - 1)) / Math.SQRT2, phaseDeg: 180 };
  });
}
