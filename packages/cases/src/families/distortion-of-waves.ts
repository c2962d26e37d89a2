import { analyseOneChannel, commonSettings, nominalOf } from '../analyse-case.js';
import type { Mapper } from '../quantities.js';
import { waveQuantities } from './wave-quantities.js';

/** Family 3: waves of known Fourier series, by least squares over the whole record. */
export const distortionOfWaves: Mapper = async (folder, one) => {
  const channel = await analyseOneChannel(folder, one, {
    profile: 'general',
    nominalFrequencyHz: nominalOf(one),
    maxOrder: commonSettings.parse(one.analysis).orders,
  });
  return waveQuantities(channel);
};
