import { expect, it } from 'vitest';
import { settingsWords } from './settings-words.js';

it('settings of an analysis are told in a line', () => {
  expect(settingsWords({ profile: 'general', nominalFrequencyHz: 'auto', window: 'hann' })).toBe(
    'general, fundamental searched, hann window for the drawn spectrum, whole record',
  );
});

it('of power and the measuring chain is told what was chosen', () => {
  const words = settingsWords({
    ...{ profile: 'mains', nominalFrequencyHz: 50, ratedCurrentA: 16, pairs: [{ voltage: 0, current: 1 }] },
    accuracy: [{ channel: 1, readingPercent: 0.5, calibrationPercent: 0.1 }],
    span: { fromS: 1, toS: 3 },
  });
  expect(words.replaceAll('\u00a0', ' ')).toBe(
    'mains, nominal 50 Hz, 1 pair chosen, rated 16 A, accuracy stated of 1 channel, 1.00 s to 3.00 s',
  );
});
