import { expect, it } from 'vitest';
import { settingsWords } from './settings-words.js';

it('settings of an analysis are told in a line', () => {
  expect(settingsWords({ profile: 'general', nominalFrequencyHz: 'auto', window: 'hann' })).toBe(
    'general, fundamental searched, hann window for the drawn spectrum, whole record',
  );
});
