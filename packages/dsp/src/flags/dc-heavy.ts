import type { Flag } from '../types.js';

const LIMIT = 0.5;

/** |DC| above half of the AC rms. */
export function dcHeavyFlag(mean: number, acRms: number, unit: string): Flag | null {
  if (!(acRms > 0) || Math.abs(mean) <= LIMIT * acRms) return null;
  return {
    code: 'dc-heavy',
    severity: 'warning',
    message:
      `The DC component of ${mean.toPrecision(4)} ${unit} is ${(Math.abs(mean) / acRms).toPrecision(3)} times the AC rms of ` +
      `${acRms.toPrecision(4)} ${unit}. Check the offset of the probe or channel, or whether DC belongs to the signal.`,
  };
}
