import { analyseOneChannel, nominalOf } from '../analyse-case.js';
import type { Mapper } from '../quantities.js';
import { waveQuantities } from './wave-quantities.js';

/** Family 1: a pure sine, by least squares over the whole record. */
export const sines: Mapper = async (folder, one) => {
  const channel = await analyseOneChannel(folder, one, {
    profile: 'general',
    nominalFrequencyHz: nominalOf(one),
  });
  const { fundamental } = channel;
  return {
    ...waveQuantities(channel),
    amplitude: fundamental && Math.SQRT2 * fundamental.rms,
    fundamental_rms: fundamental && fundamental.rms,
    phase_deg: fundamental && fundamental.phaseDeg,
  };
};
