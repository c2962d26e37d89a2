import { describe, expect, it } from 'vitest';
import { frequencyWords } from './frequency-words.js';

/** Two standard deviations, two digits, both to one place: JCGM 100:2008, 6.2.1 and 7.2.6. */
describe('the frequency of the fundamental in a report', () => {
  it.each([
    [49.981, 0.0001, 'Fundamental (± at k = 2)', '49.98100 ± 0.00020 Hz'],
    [50, 0.06, 'Fundamental (± at k = 2)', '50.00 ± 0.12 Hz'],
    [997.1, 0.00497, 'Fundamental (± at k = 2)', '997.1000 ± 0.0099 Hz'],
    [12_500, 0.5, 'Fundamental (± at k = 2)', '12.5000 ± 0.0010 kHz'],
    [49.981, 1e-8, 'Fundamental', '49.9810 Hz'],
    [49.981, null, 'Fundamental', '49.981 Hz'],
  ])('of %s Hz with a deviation of %s Hz', (frequencyHz, frequencyUncertaintyHz, caption, value) => {
    const words = frequencyWords({ frequencyHz, frequencyUncertaintyHz, rms: 1, phaseDeg: null });
    expect(words.map((text) => text.replaceAll('\u00a0', ' '))).toEqual([caption, value]);
  });
});
