import type { ChannelInput, Flag } from '../types.js';
import { runsAt } from './runs-at.js';

const MIN_RUN = 2;

/** Runs of samples at the lowest or highest code of an integer format. Needs the full-scale ends of the channel. */
export function adcSaturatedFlag(channel: ChannelInput): Flag | null {
  const { samples, lowestCode, highestCode } = channel;
  if (lowestCode === undefined || highestCode === undefined) return null;
  const low = Math.min(lowestCode, highestCode);
  const high = Math.max(lowestCode, highestCode);
  const tolerance = 1e-10 * (high - low);
  const top = runsAt(samples, high - tolerance, Infinity, MIN_RUN);
  const bottom = runsAt(samples, -Infinity, low + tolerance, MIN_RUN);
  if (top.count + bottom.count === 0) return null;
  return {
    code: 'adc-saturated',
    severity: 'error',
    message:
      `The converter stood at its highest code for ${top.samples} samples in ${top.count} runs and at its lowest code ` +
      `for ${bottom.samples} samples in ${bottom.count} runs. Choose a larger input range and record again.`,
  };
}
