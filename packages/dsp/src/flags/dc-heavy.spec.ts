import { describe, expect, it } from 'vitest';
import { dcHeavyFlag } from './dc-heavy.js';

const message = (mean: number, acRms: number, unit: string) => dcHeavyFlag(mean, acRms, unit)?.message;

// SI brochure, 9th ed., 5.4.3: one space between number and unit; a bare number has none behind it.
describe('the words of a heavy DC component', () => {
  it('write amounts below a million in digits alone', () => {
    expect(message(32_768, 2, 'V')).toContain(
      'The DC component of 32770 V is 16400 times the AC rms of 2.000 V. Check',
    );
  });

  it('leave no gap where there is no unit', () => {
    expect(message(3, 2, '')).toContain('The DC component of 3.000 is 1.50 times the AC rms of 2.000. Check');
  });
});
