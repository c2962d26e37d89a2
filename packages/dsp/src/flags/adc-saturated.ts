import type { Flag } from '../types.js';
import { firstTimes } from './evidence.js';
import type { ScanFindings } from './flag-scan.js';

const MIN_RUN = 2;

/** Runs of samples at the lowest or highest code of an integer format. Needs the full-scale ends of the channel. */
export function adcSaturatedFlag({ top, bottom }: ScanFindings, sampleRateHz: number): Flag | null {
  const count = top.saturated.count + bottom.saturated.count;
  if (count === 0) return null;
  return {
    code: 'adc-saturated',
    severity: 'error',
    message:
      `The converter stood at its highest code for ${top.saturated.samples} samples in ${top.saturated.count} runs and ` +
      `at its lowest code for ${bottom.saturated.samples} samples in ${bottom.saturated.count} runs. ` +
      'Choose a larger input range and record again.',
    evidence: {
      count,
      timesS: firstTimes([...top.saturated.positions, ...bottom.saturated.positions], sampleRateHz),
      value: Math.max(top.saturated.longest, bottom.saturated.longest),
      limit: MIN_RUN,
      unit: 'samples',
    },
  };
}
