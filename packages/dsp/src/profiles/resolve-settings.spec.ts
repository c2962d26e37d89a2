import { describe, expect, it } from 'vitest';
import { AnalysisInputError } from '../errors.js';
import type { AnalysisSettings, ChannelDescription } from '../types.js';
import { resolveSettings } from './resolve-settings.js';

const CHANNELS: ChannelDescription[] = [
  { index: 0, name: 'u1', quantity: 'voltage', unit: 'V' },
  { index: 1, name: 'i1', quantity: 'current', unit: 'mA' },
  { index: 2, name: 'T', quantity: 'temperature', unit: '°C' },
  { index: 3, name: 'clamp', quantity: 'current', unit: 'mV' },
];

function resolve(settings: Partial<AnalysisSettings>) {
  return resolveSettings({ profile: 'mains', nominalFrequencyHz: 50, ...settings }, CHANNELS);
}

describe('resolved settings', () => {
  // 200 ms hold 10 cycles at 50 Hz (IEC 61000-4-7, 4.4.1), so 2000 at 10 kHz and 200 000 at 1 MHz.
  it.each([
    [50, 10],
    [10_000, 2000],
    [1e6, 200_000],
  ])('can be given again, at %s Hz too', (nominalFrequencyHz, cycles) => {
    const first = resolve({ profile: 'tone', nominalFrequencyHz });
    expect(first.cyclesPerWindow).toBe(cycles);
    expect(resolve({ ...first, cyclesPerWindow: cycles })).toEqual(first);
  });

  it('keep what was given and add nothing that was not', () => {
    const given = {
      ...{ kaiserBeta: 12, segmentLength: 4096, overlapPercent: 75, ratedCurrentA: 16 },
      bandHz: { fromHz: 20, toHz: 20_000 },
      pairs: [{ voltage: 0, current: 1 }],
      accuracy: [{ channel: 1, readingPercent: 0.5, calibrationPercent: 0.2 }],
    };
    expect(resolve(given)).toMatchObject(given);
    expect(Object.keys(resolve({}))).toEqual([
      ...['profile', 'nominalFrequencyHz', 'window', 'maxOrder', 'thdMaxOrder', 'cyclesPerWindow'],
    ]);
  });

  it.each<[string, Partial<AnalysisSettings>]>([
    ['The β of the Kaiser window must lie between 0 and 40, got 41.', { kaiserBeta: 41 }],
    ['The overlap of segments in percent must lie between 0 and 95, got -1.', { overlapPercent: -1 }],
    [
      'The number of samples per segment must be a whole number from 16 to 4194304, got 8.',
      { segmentLength: 8 },
    ],
    [
      'The band must run upwards from 0 Hz or above, got 50 Hz to 20 Hz.',
      { bandHz: { fromHz: 50, toHz: 20 } },
    ],
    ['The settings name channel 9, which the record does not have.', { pairs: [{ voltage: 9, current: 1 }] }],
    [
      "Channel 'T' measures temperature; the settings take it for a current.",
      { pairs: [{ voltage: 0, current: 2 }] },
    ],
    [
      "Channel 'clamp' has the unit 'mV'; a power needs A or a multiple of it.",
      { pairs: [{ voltage: 0, current: 3 }] },
    ],
    [
      'The voltages of three phases must be three different channels, got 0, 0, 0.',
      { threePhase: [{ voltages: [0, 0, 0], currents: [1, 1, 1], wires: '4w' }] },
    ],
    ['The rated current must be a positive number of amperes, got 0.', { ratedCurrentA: 0 }],
    [
      "The limits of error of channel 'i1' must lie between 0 % and 100 %, got -2.",
      { accuracy: [{ channel: 1, readingPercent: -2, calibrationPercent: 0 }] },
    ],
    [
      'The accuracy of channel 1 is given twice.',
      {
        accuracy: [
          { channel: 1, readingPercent: 1, calibrationPercent: 0 },
          { channel: 1, readingPercent: 2, calibrationPercent: 0 },
        ],
      },
    ],
  ])('are refused: %s', (message, settings) => {
    expect(() => resolve(settings)).toThrow(AnalysisInputError);
    expect(() => resolve(settings)).toThrow(message);
  });
});
