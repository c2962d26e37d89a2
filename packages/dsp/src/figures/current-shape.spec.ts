import { describe, expect, it } from 'vitest';
import { currentShape } from './current-shape.js';

const sampleRateHz = 50_000;
const frequencyHz = 50;
const samples = 5000;

/** A stretch of five cycles whose voltage begins `shiftDeg` after its zero crossing; `currentAt` of the angle, 0 to 180. */
function stretch(currentAt: (deg: number) => number, shiftDeg = 37): Parameters<typeof currentShape>[0] {
  const angle = (i: number) => shiftDeg + (360 * frequencyHz * i) / sampleRateHz;
  const voltage = Float64Array.from(
    { length: samples },
    (_, i) => 325 * Math.sin((angle(i) * Math.PI) / 180),
  );
  const current = Float64Array.from({ length: samples }, (_, i) => {
    const within = angle(i) % 360;
    return within < 180 ? currentAt(within) : -currentAt(within - 180);
  });
  return { current, voltage, sampleRateHz, frequencyHz };
}

/** A triangle from `from` to `to` with its top at `top`: 5 % of the top is reached 5 % of the way up. */
const triangle = (from: number, top: number, to: number) => (deg: number) =>
  deg <= from || deg >= to ? 0 : deg <= top ? (deg - from) / (top - from) : (to - deg) / (to - top);

// A sample is 0.36 degrees; the filter rounds corners by less than that.
const within = 0.8;

describe('shape of a current against its voltage', () => {
  it.each([0, 37, 181, 300])(
    'is read from the zero crossing, wherever the stretch begins (%i degrees)',
    (shift) => {
      const shape = currentShape(stretch(triangle(50, 70, 120), shift))!;
      expect(Math.abs(shape.startsDeg - 51)).toBeLessThan(within);
      expect(Math.abs(shape.peakDeg - 70)).toBeLessThan(within);
      expect(Math.abs(shape.endsDeg - 117.5)).toBeLessThan(within);
    },
  );

  it('takes the last of several peaks, and no ripple below 5 % for one', () => {
    const two = (deg: number) => triangle(40, 60, 75)(deg) + 0.6 * triangle(75, 90, 110)(deg);
    expect(Math.abs(currentShape(stretch(two))!.peakDeg - 90)).toBeLessThan(within);
    const ripple = (deg: number) => triangle(40, 60, 110)(deg) + 0.02 * Math.sin(deg);
    expect(Math.abs(currentShape(stretch(ripple))!.peakDeg - 60)).toBeLessThan(2);
  });

  it('is the same for a current whose probe was turned round', () => {
    const upright = stretch(triangle(50, 70, 120));
    const turned = { ...upright, current: upright.current.map((value) => -value) };
    expect(currentShape(turned)).toEqual(currentShape(upright));
  });

  it('leaves content above 9 kHz out', () => {
    const clean = stretch(triangle(50, 70, 120));
    const tone = (i: number) => 0.3 * Math.sin((2 * Math.PI * 15_000 * i) / sampleRateHz);
    const noisy = { ...clean, current: clean.current.map((value, i) => value + tone(i)) };
    const [shape, wanted] = [currentShape(noisy)!, currentShape(clean)!];
    expect(Math.abs(shape.startsDeg - wanted.startsDeg)).toBeLessThan(0.8);
    expect(Math.abs(shape.endsDeg - wanted.endsDeg)).toBeLessThan(0.8);
  });

  it('is not told by a stretch that is too short or too coarse, or without current', () => {
    const whole = stretch(triangle(50, 70, 120));
    const short = {
      ...whole,
      current: whole.current.subarray(0, 1500),
      voltage: whole.voltage.subarray(0, 1500),
    };
    expect(currentShape(short)).toBeNull();
    expect(currentShape({ ...whole, frequencyHz: 600 })).toBeNull();
    expect(currentShape({ ...whole, current: new Float64Array(samples) })).toBeNull();
    expect(currentShape({ ...whole, voltage: new Float64Array(samples) })).toBeNull();
  });
});
