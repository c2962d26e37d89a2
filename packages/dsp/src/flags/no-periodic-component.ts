import type { Flag } from '../types.js';

/** No fundamental was found where it was looked for. Nothing can be shown for what is not there: no evidence. */
export function noPeriodicComponentFlag(nominalFrequencyHz: number | 'auto'): Flag {
  const where =
    nominalFrequencyHz === 'auto' ? 'anywhere in the spectrum' : `within 15 % of ${nominalFrequencyHz} Hz`;
  return {
    code: 'no-periodic-component',
    severity: 'warning',
    message: `No fundamental stands out of the noise ${where}, so no harmonics are given. Check the channel and the nominal frequency.`,
    evidence: null,
  };
}
