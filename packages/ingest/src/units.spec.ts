import { describe, expect, it } from 'vitest';
import { secondsPerUnit, unitMeaning } from './units.js';

// Prefix factors: SI brochure, 9th edition, table 7.
describe('units', () => {
  it.each([
    ['kV', 'V', 1e3, 'voltage'],
    ['mV', 'V', 1e-3, 'voltage'],
    ['µA', 'A', 1e-6, 'current'],
    ['μA', 'A', 1e-6, 'current'],
    ['MW', 'W', 1e6, 'power'],
    ['mW', 'W', 1e-3, 'power'],
    ['mPa', 'Pa', 1e-3, 'sound_pressure'],
    ['g', 'g', 1, 'acceleration'],
    ['m/s²', 'm/s²', 1, 'acceleration'],
    ['m/s^2', 'm/s²', 1, 'acceleration'],
    ['m/s2', 'm/s²', 1, 'acceleration'],
    ['mm/s', 'm/s', 1e-3, 'velocity'],
    ['Volt', 'V', 1, 'voltage'],
    ['Amps', 'A', 1, 'current'],
    ['%', '%', 1, 'dimensionless'],
    ['°C', '°C', 1, 'other'],
    ['kg', 'kg', 1, 'other'],
  ])('%s is %s times %d', (written, base, factor, quantity) => {
    expect(unitMeaning(written)).toEqual({ base, factor, quantity });
  });

  it.each(['', 'xV', 'G1', 'constructor', 'kkV'])('does not know "%s"', (written) => {
    expect(unitMeaning(written)).toBeNull();
  });

  it.each([
    ['s', 1],
    ['ms', 1e-3],
    ['µs', 1e-6],
    ['us', 1e-6],
    ['ns', 1e-9],
    ['seconds', 1],
  ])('%s lasts %d s', (written, seconds) => {
    expect(secondsPerUnit(written)).toBe(seconds);
  });

  it('takes no other unit for a time', () => {
    expect(secondsPerUnit('V')).toBeNull();
    expect(secondsPerUnit('m/s')).toBeNull();
  });
});
